import { readFile } from 'node:fs/promises';
import { en as words } from '../words/en.ts';
import { Refusal } from './refusal.ts';

/** Code of a system error ("ENOENT"), or null. */
export function systemCode(error: unknown): string | null {
  const { code } = error instanceof Error ? (error as NodeJS.ErrnoException) : {};
  return typeof code === 'string' ? code : null;
}

/** A text file's content in UTF-8, or UTF-16 where its byte order mark says so. Throws Refusal. */
export async function readTextFile(path: string): Promise<string> {
  let bytes: Uint8Array;
  try {
    bytes = await readFile(path);
  } catch (error) {
    const code = systemCode(error);
    if (code === null) throw error;
    throw new Refusal(words.terminal.cannotRead(path, code));
  }
  const [a, b] = bytes;
  const encoding =
    a === 0xff && b === 0xfe ? 'utf-16le' : a === 0xfe && b === 0xff ? 'utf-16be' : 'utf-8';
  return new TextDecoder(encoding).decode(bytes);
}
