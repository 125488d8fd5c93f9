import type { StateCreator } from 'zustand/vanilla';
import type { AppState } from './index.ts';

export interface Message {
  readonly id: number;
  readonly kind: 'news' | 'trouble';
  readonly text: string;
}

export interface MessageSlice {
  readonly messages: readonly Message[];
  tell: (kind: Message['kind'], text: string) => void;
  dismiss: (id: number) => void;
}

let count = 0;

export const messageSlice: StateCreator<AppState, [], [], MessageSlice> = (set) => ({
  messages: [],
  tell: (kind, text) =>
    set(({ messages }) => ({
      // The same trouble twice is one message.
      messages: [...messages.filter((m) => m.text !== text), { id: ++count, kind, text }].slice(-4),
    })),
  dismiss: (id) => set(({ messages }) => ({ messages: messages.filter((m) => m.id !== id) })),
});
