import { ReadingError } from '../../core/units/index.ts';
import type { SheetIssue } from '../../core/sheet/read.ts';
import type { Words } from '../words/en.ts';

/** Runs `make`; a reading that cannot be taken comes back as its sentence. */
export function tried<T>(words: Words, make: () => T): { ok: T } | { trouble: string } {
  try {
    return { ok: make() };
  } catch (error) {
    if (error instanceof ReadingError) return { trouble: words.reading(error.issue) };
    throw error;
  }
}

/** What is wrong with a file, the first few places in full. */
export function sayIssues(words: Words, issues: readonly SheetIssue[]): string {
  return issues
    .slice(0, 3)
    .map((issue) => words.sheetIssue(issue))
    .join(' ');
}
