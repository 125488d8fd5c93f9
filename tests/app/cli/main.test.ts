import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { file, ran } from './ran.ts';

const root = fileURLToPath(new URL('../../../', import.meta.url));

/** The real command in a process of its own. */
function spawned(...args: readonly string[]) {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['node_modules/tsx/dist/cli.mjs', 'app/cli/main.ts', ...args],
    { cwd: root, encoding: 'utf8' },
  );
  return { status, stdout, stderr };
}

describe('the command', { timeout: 60_000 }, () => {
  it('answers on standard output with status 0', () => {
    const { status, stdout, stderr } = spawned(
      'state',
      'water',
      '--T',
      '-20 °C',
      '--p',
      '1 bar(a)',
      '--json',
    );
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
    expect(JSON.parse(stdout)).toMatchObject({ phase: 'solid', solid: 'ice Ih' });
  });

  it('refuses with one line on standard error and status 2', () => {
    const path = file('T,p\n300,100000\nx,1\n');
    const { status, stdout, stderr } = spawned('state', 'water', '--from', path);
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
    expect(stderr).toMatch(/^simmerline: [^\n]*line 3[^\n]*\n$/);
  });

  it('writes long answers whole', () => {
    const rows = Array.from({ length: 3000 }, (_, i) => `${280 + i / 50},100000`);
    const { status, stdout } = spawned(
      'state',
      'water',
      '--json',
      '--from',
      file(['T,p', ...rows].join('\n')),
    );
    expect(status).toBe(0);
    expect(JSON.parse(stdout)).toHaveLength(3000);
  });
});

describe('run', () => {
  it('--version is the version of the package', async () => {
    const { version } = JSON.parse(readFileSync(`${root}package.json`, 'utf8')) as {
      version: string;
    };
    expect(await ran('--version')).toEqual({ status: 0, out: `${version}\n`, err: '' });
  });

  it('help says what the numbers stand on', async () => {
    const { status, out } = await ran('help');
    expect(status).toBe(0);
    expect(await ran('--help')).toEqual({ status: 0, out, err: '' });
    for (const said of [
      'A pressure without a kind is absolute',
      '101.325 kPa',
      'u = s = 0 for saturated liquid at the triple point',
      'h = s = 0 for the ideal gas at 298.15 K and 101.325 kPa',
      'Exit status: 0 done, 2 refused',
    ])
      expect(out.replace(/\s+/g, ' ')).toContain(said);
  });

  it.each(['state', 'boundary', 'figure', 'substances', 'help'])(
    'help %s tells of that command, as does its --help',
    async (command) => {
      const { status, out } = await ran('help', command);
      expect(status).toBe(0);
      expect(out.startsWith(command)).toBe(true);
      expect((await ran(command, '--help')).out).toBe(out);
    },
  );

  it('substances lists ids, formulas and numbers', async () => {
    const { out } = await ran('substances');
    expect(out).toMatch(/^water +H2O +7732-18-5 +R-718 /m);
    expect(out).toMatch(/^carbon-dioxide +CO2 +124-38-9 +R-744 /m);
  });

  it.each([[[]], [['melt']], [['help', 'melt']], [['toString']], [['help', 'constructor']]])(
    '%j is refused with one line and status 2',
    async (args) => {
      const { status, out, err } = await ran(...args);
      expect({ status, out }).toEqual({ status: 2, out: '' });
      expect(err).toMatch(/^simmerline: [^\n]+\n$/);
    },
  );
});
