import { en as words } from '../words/en.ts';
import { Refusal } from './refusal.ts';

export interface Options {
  readonly positionals: readonly string[];
  readonly values: ReadonlyMap<string, string>;
  readonly flags: ReadonlySet<string>;
}

/**
 * Options and positionals of a command line. A value may start with one minus sign
 * (`--T "-20 °C"`) or follow an equals sign (`--T=-20C`); after `--` all are positionals.
 * Throws Refusal for an option unknown, given twice, without its value, or with one too many, and
 * for more positionals than `most`.
 */
export function readOptions(
  args: readonly string[],
  known: { readonly values: readonly string[]; readonly flags: readonly string[] },
  most: number,
): Options {
  const { terminal } = words;
  const positionals: string[] = [];
  const values = new Map<string, string>();
  const flags = new Set<string>();
  let open = true;
  for (let i = 0; i < args.length; i++) {
    const arg = args[i]!;
    if (open && arg === '--') {
      open = false;
      continue;
    }
    if (!open || !/^--?[A-Za-z]/.test(arg)) {
      positionals.push(arg);
      continue;
    }
    const [option = '', ...rest] = arg.split('=');
    const name = option.slice(2);
    const takesValue = known.values.includes(name);
    if (!option.startsWith('--') || !(takesValue || known.flags.includes(name)))
      throw new Refusal(
        terminal.unknownOption(
          option,
          [...known.values, ...known.flags].map((n) => `--${n}`),
        ),
      );
    if (values.has(name) || flags.has(name)) throw new Refusal(terminal.twice(option));
    if (!takesValue) {
      if (rest.length > 0) throw new Refusal(terminal.noValue(option));
      flags.add(name);
      continue;
    }
    const value = rest.length > 0 ? rest.join('=') : args[++i];
    if (value === undefined || value.trim() === '' || value.startsWith('--'))
      throw new Refusal(terminal.valueMissing(option));
    values.set(name, value);
  }
  if (positionals.length > most) throw new Refusal(terminal.tooMany(positionals[most]!));
  return { positionals, values, flags };
}
