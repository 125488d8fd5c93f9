import type { ReactNode } from 'react';
import { useApp, useAppStore } from './context.ts';

export interface Cell {
  readonly text: string;
  readonly number?: boolean;
  readonly hint?: string | undefined;
}

/** One row of the log book: its tag, its sentence, its results. */
export function LogRow({
  id,
  tag,
  colour,
  children,
  cells,
}: {
  readonly id: string;
  readonly tag: string;
  readonly colour: number;
  readonly children: ReactNode;
  readonly cells: readonly Cell[];
}) {
  const store = useAppStore();
  const selected = useApp((s) => s.selected === id);
  return (
    <tr className={selected ? 'selected' : ''} onClick={() => store.getState().select(id)}>
      <th scope="row">
        <button
          className={`tag own-${colour}`}
          aria-pressed={selected}
          onClick={() => store.getState().select(id)}
        >
          {tag}
        </button>
      </th>
      <td className="sentence">{children}</td>
      {cells.map(({ text, number, hint }, i) => (
        <td key={i} className={number ? 'number' : i === 2 ? 'phase' : ''} title={hint}>
          {text}
        </td>
      ))}
    </tr>
  );
}
