import { useRef } from 'react';
import { openFile } from './actions.ts';
import { useAppStore, useWords } from './context.ts';

/** A button that asks for a file and opens it. */
export function OpenButton({ label }: { readonly label: string }) {
  const store = useAppStore();
  const words = useWords();
  const input = useRef<HTMLInputElement>(null);
  return (
    <>
      <button onClick={() => input.current?.click()}>{label}</button>
      <input
        ref={input}
        type="file"
        accept=".json,.svg,application/json,image/svg+xml"
        hidden
        onChange={(event) => {
          const file = event.target.files?.[0];
          if (file) void openFile(store, words, file);
          event.target.value = '';
        }}
      />
    </>
  );
}
