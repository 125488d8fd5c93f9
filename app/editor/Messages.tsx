import { useApp, useAppStore, useWords } from './context.ts';

/** What the tool has to tell, until dismissed. */
export function Messages() {
  const store = useAppStore();
  const words = useWords();
  const messages = useApp((s) => s.messages);
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
