import { useEffect } from 'react';
import { useApp, useAppStore, useWords } from './context.ts';

/** How long news stand, ms; trouble stands until dismissed. */
const newsStand = 8000;

/** What the tool has to tell. */
export function Messages() {
  const store = useAppStore();
  const words = useWords();
  const messages = useApp((s) => s.messages);
  useEffect(() => {
    const timers = messages
      .filter(({ kind }) => kind === 'news')
      .map(({ id }) => setTimeout(() => store.getState().dismiss(id), newsStand));
    return () => timers.forEach(clearTimeout);
  }, [messages, store]);
  return (
    <div className="messages" aria-live="polite">
      {messages.map(({ id, kind, text }) => (
        <p key={id} className={kind}>
          <span>{text}</span>
          <button onClick={() => store.getState().dismiss(id)}>{words.editor.dismiss}</button>
        </p>
      ))}
    </div>
  );
}
