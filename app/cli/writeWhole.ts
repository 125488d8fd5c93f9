import { rename, rm, writeFile } from 'node:fs/promises';
import { en as words } from '../words/en.ts';
import { Refusal } from './refusal.ts';
import { systemCode } from './textFile.ts';

/** Writes a file whole or not at all: beside its place first, then renamed. Throws Refusal. */
export async function writeWhole(path: string, content: string): Promise<void> {
  const beside = `${path}.${process.pid}.tmp`;
  try {
    await writeFile(beside, content, { flag: 'wx' });
    await rename(beside, path);
  } catch (error) {
    const code = systemCode(error);
    if (code !== 'EEXIST') await rm(beside, { force: true });
    if (code === null) throw error;
    throw new Refusal(words.terminal.cannotWrite(path, code));
  }
}
