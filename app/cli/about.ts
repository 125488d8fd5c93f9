import { checkRows, evaluateCheck, type CheckResult } from '../../core/checks/check.ts';
import { catalogue } from '../../core/substances/catalogue.ts';
import { cardSections, checkSummary, type CardSection } from '../card/card.ts';
import { checkText, type CheckText } from '../card/checkText.ts';
import { en as words } from '../words/en.ts';
import { json } from './json.ts';
import { readOptions } from './options.ts';
import { Refusal } from './refusal.ts';
import { substanceNamed } from './substance.ts';
import type { Answer } from './terminal.ts';

const width = (text: string): number => [...text].length;
const padded = (text: string, to: number): string => text + ' '.repeat(to - width(text));

function sectionLines({ title, rows, note }: CardSection): readonly string[] {
  const label = Math.max(0, ...rows.map((row) => width(row.label)));
  const indent = label > 0 ? label + 4 : 2;
  return [
    '',
    title,
    ...rows.flatMap(({ label: name, text, source }) => [
      `  ${label > 0 ? `${padded(name, label)}  ` : ''}${text}`,
      ...(source ? [`${' '.repeat(indent)}${source}`] : []),
    ]),
    ...(note ? [`  ${note}`] : []),
  ];
}

function checkLines(checks: readonly CheckResult[]): readonly string[] {
  const { card } = words;
  const columns: readonly (keyof CheckText)[] = [
    'quantity',
    'published',
    'computed',
    'deviation',
    'share',
    'state',
  ];
  const head = {
    state: card.state,
    quantity: card.quantity,
    published: card.published,
    computed: card.computed,
    deviation: card.deviation,
    share: card.ofTolerance,
  };
  const rows = [head, ...checks.map((check) => checkText(check, words))];
  const widths = columns.map((key) => Math.max(...rows.map((row) => width(row[key]))));
  const line = (row: CheckText): string =>
    `  ${columns
      .map((key, k) => padded(row[key], widths[k]!))
      .join('  ')
      .trimEnd()}`;
  const lines: string[] = ['', card.everyValue, line(head)];
  checks.forEach((check, i) => {
    const group = `${check.source} (${card.origin[check.provenance] ?? check.provenance})`;
    const before = checks[i - 1];
    if (!before || before.source !== check.source || before.provenance !== check.provenance)
      lines.push(` ${group}`);
    lines.push(line(rows[i + 1]!));
  });
  return lines;
}

/** `about <substance> [--checks | --json]` */
export async function aboutCommand(args: readonly string[]): Promise<Answer> {
  const { terminal, card } = words;
  const { positionals, flags } = readOptions(args, { values: [], flags: ['checks', 'json'] }, 1);
  if (flags.size > 1) throw new Refusal(terminal.eitherOf(['--checks', '--json']));
  const m = await substanceNamed(positionals[0]);
  const { id } = m.substance;
  const rows = checkRows(await catalogue.find((entry) => entry.id === id)!.checks());
  const checks = rows.map((row) => evaluateCheck(m, row));
  if (flags.has('json')) return { out: json({ substance: m.substance, checks }), notes: [] };
  const sections = [...cardSections(m, words), checkSummary(checks, words)];
  return {
    out: [
      card.title(words.substance(id)),
      ...sections.flatMap(sectionLines),
      ...(flags.has('checks') ? checkLines(checks) : []),
      '',
    ].join('\n'),
    notes: [],
  };
}
