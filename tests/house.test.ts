import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');

const sources = (folder: string): readonly string[] =>
  readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.tsx?$/.test(entry.name))
    .map((entry) => relative(root, join(entry.parentPath, entry.name)).split(sep).join('/'))
    .sort();

interface Import {
  readonly from: string;
  /** A file of this project, or what package is named. */
  readonly to: string;
  /** An import of types alone is gone at run time. */
  readonly typeOnly: boolean;
}

const parsed = new Map<string, ts.SourceFile>();
function sourceOf(file: string): ts.SourceFile {
  const known = parsed.get(file);
  if (known) return known;
  const made = ts.createSourceFile(
    file,
    readFileSync(join(root, file), 'utf8'),
    ts.ScriptTarget.Latest,
    true,
  );
  parsed.set(file, made);
  return made;
}

function walk(node: ts.Node, visit: (node: ts.Node) => void): void {
  visit(node);
  node.forEachChild((child) => walk(child, visit));
}

/** Everything a file names as another module: import, export from, import() and import types. */
function importsOf(file: string): readonly Import[] {
  const found: Import[] = [];
  const add = (specifier: ts.Node | undefined, typeOnly: boolean): void => {
    if (!specifier || !ts.isStringLiteralLike(specifier)) return;
    const name = specifier.text.replace(/\?.*$/, '');
    const to = name.startsWith('.') ? join(dirname(file), name).split(sep).join('/') : name;
    // Tables of values are data, not modules of a room.
    if (!to.endsWith('.json')) found.push({ from: file, to, typeOnly });
  };
  walk(sourceOf(file), (node) => {
    if (ts.isImportDeclaration(node))
      add(node.moduleSpecifier, node.importClause?.isTypeOnly === true);
    else if (ts.isExportDeclaration(node)) add(node.moduleSpecifier, node.isTypeOnly);
    else if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword)
      add(node.arguments[0], false);
    else if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument))
      add(node.argument.literal, true);
  });
  return found;
}

const files = { core: sources('core'), app: sources('app') };
const imports = { core: files.core.flatMap(importsOf), app: files.app.flatMap(importsOf) };
const told = ({ from, to }: Import): string => `${from} → ${to}`;
const isOf = (folder: string) => (path: string) => path.startsWith(`${folder}/`);

/** Which rooms each room of core may use, itself left aside; errors.ts is open to all. */
const order = [
  ['sheet'],
  ['cautions', 'checks', 'limits', 'logs', 'product', 'process'],
  ['map'],
  ['equilibrium'],
  ['models'],
  ['substances'],
  ['units'],
] as const;
const rank = (room: string): number =>
  order.findIndex((rooms) => (rooms as readonly string[]).includes(room));
const roomOf = (path: string): string => path.split('/')[1]!;

describe('imports of the house', () => {
  it('are found at all, types included', () => {
    expect(imports.core.map(told)).toContain('core/map/trace.ts → core/map/boundary.ts');
    expect(imports.core.map(told)).toContain(
      'core/substances/catalogue.ts → core/substances/water.ts',
    );
    expect(imports.core.length).toBeGreaterThan(100);
    expect(imports.app.length).toBeGreaterThan(100);
  });

  it('name files that are there', () => {
    const all = new Set([...files.core, ...files.app]);
    const lost = [...imports.core, ...imports.app].filter(
      ({ to }) => /^(core|app)\//.test(to) && /\.tsx?$/.test(to) && !all.has(to),
    );
    expect(lost.map(told)).toEqual([]);
  });

  it('go down through core, each room using only those below it', () => {
    const rooms = new Set(files.core.filter((f) => f !== 'core/errors.ts').map(roomOf));
    expect([...rooms].filter((room) => rank(room) < 0)).toEqual([]);
    const upwards = imports.core.filter(({ from, to }) => {
      if (!isOf('core')(to) || to === 'core/errors.ts' || roomOf(from) === roomOf(to)) return false;
      return from === 'core/errors.ts' || !(rank(roomOf(from)) <= rank(roomOf(to)));
    });
    expect(upwards.map(told)).toEqual([]);
  });

  it('never go from core to app, a drawing library, a page library or Node', () => {
    const allowed = new Set(['valibot', 'papaparse']);
    const foreign = imports.core.filter(({ to }) => !isOf('core')(to) && !allowed.has(to));
    expect(foreign.map(told)).toEqual([]);
  });

  it('bring neither store nor editor into figure, words, export and worker', () => {
    const wrong = imports.app.filter(
      ({ from, to }) =>
        ['figure', 'words', 'export', 'worker', 'cli'].includes(roomOf(from)) &&
        ['store', 'editor'].includes(roomOf(to)) &&
        isOf('app')(to),
    );
    expect(wrong.map(told)).toEqual([]);
  });

  it('bring only d3 from outside into the figure, and nothing but core and type into words', () => {
    const tools = new Set(['app/figure/type/makeFont.ts']);
    const figure = imports.app.filter(
      ({ from, to }) =>
        from.startsWith('app/figure/') &&
        !tools.has(from) &&
        !/^(app|core)\//.test(to) &&
        to !== 'd3',
    );
    expect(figure.map(told)).toEqual([]);
    const words = imports.app.filter(
      ({ from, to }) => from.startsWith('app/words/') && !/^(app\/words|core)\//.test(to),
    );
    expect(words.map(told)).toEqual([]);
  });

  const circlesOf = (all: readonly Import[]): readonly (readonly string[])[] => {
    const next = new Map<string, string[]>();
    for (const { from, to } of all) next.set(from, [...(next.get(from) ?? []), to]);
    const circles: string[][] = [];
    const done = new Set<string>();
    const way: string[] = [];
    const visit = (file: string): void => {
      const at = way.indexOf(file);
      if (at >= 0) circles.push([...way.slice(at), file]);
      if (at >= 0 || done.has(file)) return;
      way.push(file);
      for (const to of next.get(file) ?? []) visit(to);
      way.pop();
      done.add(file);
    };
    for (const file of next.keys()) visit(file);
    return circles;
  };
  const all = [...imports.core, ...imports.app];

  it('run in no circle', () => {
    expect(circlesOf(all.filter(({ typeOnly }) => !typeOnly))).toEqual([]);
    // What the search is worth: a circle is seen.
    const bent = [
      ...all,
      { from: 'core/units/index.ts', to: 'core/map/trace.ts', typeOnly: false },
    ];
    expect(circlesOf(bent)).not.toEqual([]);
  });

  // A type may name what is made of it (a medium and its saturation, a store and its slices):
  // erased at run time, and only between neighbours in one folder.
  it('with types included run in circles only inside a folder', () => {
    const wide = circlesOf(all).filter((circle) => new Set(circle.map(dirname)).size > 1);
    expect(wide).toEqual([]);
  });
});

/** Names that only a page, a worker or Node has; core must not lean on any of them. */
const hosts = new Set(
  'window document navigator location localStorage sessionStorage indexedDB fetch XMLHttpRequest Worker postMessage requestAnimationFrame process Buffer require __dirname global console performance crypto Date setTimeout setInterval queueMicrotask'.split(
    ' ',
  ),
);

describe('core', () => {
  it('uses no global of a page or of Node, no clock and no chance', () => {
    const found: string[] = [];
    for (const file of files.core)
      walk(sourceOf(file), (node) => {
        if (!ts.isIdentifier(node)) return;
        const { parent } = node;
        const isName =
          (ts.isPropertyAccessExpression(parent) && parent.name === node) ||
          (ts.isPropertyAssignment(parent) && parent.name === node) ||
          ts.isPropertySignature(parent) ||
          ts.isParameter(parent) ||
          ts.isBindingElement(parent) ||
          (ts.isVariableDeclaration(parent) && parent.name === node) ||
          ts.isTypeReferenceNode(parent);
        if (hosts.has(node.text) && !isName) found.push(`${file}: ${node.text}`);
        if (node.text === 'random' && ts.isPropertyAccessExpression(parent))
          found.push(`${file}: ${parent.getText()}`);
      });
    expect(found).toEqual([]);
  });

  it('models iterate over their terms only, and substances compute nothing', () => {
    const found: string[] = [];
    for (const file of files.core.filter((f) => f.startsWith('core/models/')))
      walk(sourceOf(file), (node) => {
        // A loop without a fixed end is a solver.
        if (ts.isWhileStatement(node) || ts.isDoStatement(node))
          found.push(`${file}: ${node.getText().slice(0, 40)}`);
      });
    const data = files.core.filter(
      (f) => f.startsWith('core/substances/') && !/\/(catalogue|substance)\.ts$/.test(f),
    );
    expect(data.length).toBeGreaterThanOrEqual(2);
    for (const file of data)
      walk(sourceOf(file), (node) => {
        if (ts.isForStatement(node) || ts.isForOfStatement(node) || ts.isWhileStatement(node))
          found.push(`${file}: ${node.getText().slice(0, 40)}`);
        if (ts.isFunctionLike(node) && !ts.isFunctionTypeNode(node))
          found.push(`${file}: ${node.getText().slice(0, 40)}`);
      });
    expect(found).toEqual([]);
  });
});
