import { readFileSync } from 'node:fs';
import { catalogue } from '../../core/substances/catalogue.ts';
import { en as words } from '../words/en.ts';
import { readOptions } from './options.ts';
import { Refusal, refusalOf } from './refusal.ts';
import { exitStatus, oneLine, type Answer, type Terminal } from './terminal.ts';

type Command = (args: readonly string[]) => Answer | Promise<Answer>;

/** Every command, one line each; what it needs is loaded when it runs. */
const commands: Readonly<Record<string, Command>> = {
  state: async (args) => (await import('./state.ts')).stateCommand(args),
  boundary: async (args) => (await import('./boundary.ts')).boundaryCommand(args),
  figure: async (args) => (await import('./figure.ts')).figureCommand(args),
  about: async (args) => (await import('./about.ts')).aboutCommand(args),
  substances: substancesCommand,
  help: helpCommand,
};

function substancesCommand(args: readonly string[]): Answer {
  readOptions(args, { values: [], flags: [] }, 0);
  const rows = catalogue.map(({ id, names, formula, cas, refrigerant }) => [
    id,
    formula,
    cas,
    refrigerant ?? '',
    names.join(', '),
  ]);
  const all = [words.terminal.substanceColumns, ...rows];
  const widths = all[0]!.map((_, k) => Math.max(...all.map((row) => row[k]!.length)));
  const lines = all.map((row) =>
    row
      .map((text, k) => text.padEnd(widths[k]!))
      .join('  ')
      .trimEnd(),
  );
  return { out: [...lines, ''].join('\n'), notes: [] };
}

function helpCommand(args: readonly string[]): Answer {
  const { help, unknownCommand } = words.terminal;
  const [about] = readOptions(args, { values: [], flags: [] }, 1).positionals;
  if (about === undefined) return { out: help.general, notes: [] };
  if (!Object.hasOwn(help, about)) throw new Refusal(unknownCommand(about, Object.keys(commands)));
  return { out: help[about as keyof typeof help], notes: [] };
}

function version(): Answer {
  const text = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
  const { version } = JSON.parse(text) as { readonly version: string };
  return { out: `${version}\n`, notes: [] };
}

async function answer([command, ...args]: readonly string[]): Promise<Answer> {
  const { terminal } = words;
  const names = Object.keys(commands);
  if (command === undefined) throw new Refusal(terminal.noCommand(names));
  if (command === '--help' || command === '-h') return helpCommand([]);
  if (command === '--version') return version();
  if (!Object.hasOwn(commands, command)) throw new Refusal(terminal.unknownCommand(command, names));
  if (args.includes('--help') || args.includes('-h')) return helpCommand([command]);
  return commands[command]!(args);
}

/**
 * Runs the tool with the words of a command line and gives its exit status. Standard output gets the
 * whole answer or nothing; a refusal or a fault is one line on standard error.
 */
export async function run(args: readonly string[], { out, err }: Terminal): Promise<number> {
  try {
    const { out: text, notes } = await answer(args);
    out(text);
    for (const note of notes) err(`${oneLine(note)}\n`);
    return exitStatus.done;
  } catch (thrown) {
    const error = await refusalOf(thrown);
    if (error instanceof Refusal) {
      err(`${oneLine(words.terminal.refused(error.message))}\n`);
      return exitStatus.refused;
    }
    const detail = error instanceof Error ? error.message : String(error);
    err(`${oneLine(words.terminal.fault(detail))}\n`);
    return exitStatus.fault;
  }
}
