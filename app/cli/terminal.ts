/** Where a command writes; the process's streams, or a test's lists. */
export interface Terminal {
  readonly out: (text: string) => void;
  readonly err: (text: string) => void;
}

/** What a command hands back: standard output whole, and notes for standard error. */
export interface Answer {
  readonly out: string;
  readonly notes: readonly string[];
}

/** Exit statuses, as the help says them. */
export const exitStatus = { done: 0, fault: 1, refused: 2 } as const;

/**
 * One line for a terminal: line breaks and control characters of quoted text become spaces, as do
 * non-breaking ones.
 */
export function oneLine(text: string): string {
  return text
    .replace(/[\p{Cc}\p{Zl}\p{Zp}\p{Bidi_Control}\u00a0]+/gu, ' ')
    .replace(/ {2,}/g, ' ')
    .trim();
}
