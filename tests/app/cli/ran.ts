import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { run } from '../../../app/cli/run.ts';

/** What a command line gave: exit status and both streams. */
export interface Ran {
  readonly status: number;
  readonly out: string;
  readonly err: string;
}

/** Runs the tool inside this process. */
export async function ran(...args: readonly string[]): Promise<Ran> {
  const [out, err]: [string[], string[]] = [[], []];
  const status = await run(args, {
    out: (text) => out.push(text),
    err: (text) => err.push(text),
  });
  return { status, out: out.join(''), err: err.join('') };
}

/** JSON that a command gave. */
export async function given<T>(...args: readonly string[]): Promise<T> {
  const { status, out, err } = await ran(...args, '--json');
  if (status !== 0) throw new Error(err);
  return JSON.parse(out) as T;
}

/** A folder of its own for a test's files. */
export const folder = (): string => mkdtempSync(join(tmpdir(), 'simmerline-'));

/** A file with this content; its path. */
export function file(content: string | Uint8Array, name = 'points.csv'): string {
  const path = join(folder(), name);
  writeFileSync(path, content);
  return path;
}
