import { afterAll, beforeAll, expect, it } from 'vitest';
import { sheetFromSvg } from '../../app/export/sheetInSvg.ts';
import { cells, drawn, exported, fill, harness, number, type Harness } from './harness.ts';

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

const hostile = `<img src=x onerror=alert(1)><script>alert(2)</script>"'&amp;]]>`;

it('text stays text, on the page and in what is exported', async () => {
  const { page, context, troubles, strangers } = await h.open('?demo=retort');
  let asked = 0;
  page.on('dialog', (dialog) => {
    asked++;
    void dialog.dismiss();
  });
  await drawn(page);
  await fill(page, 'name of the sheet', hostile);
  await page.getByRole('button', { name: 'A1', exact: true }).click();
  await fill(page, 'name of A', hostile);
  await fill(page, 'name of the site', hostile);
  await page.getByLabel('a reading of your gauge or thermometer').fill(hostile);
  await page.getByRole('button', { name: 'Add a state' }).click();
  await fill(page, 'name of 1', `</text></svg>${hostile}`);
  await fill(page, 'temperature of 1', hostile);
  await drawn(page);
  expect(await page.locator('img, .workplace script, .page svg image').count()).toBe(0);
  expect(await page.locator('.page svg').textContent()).toContain('<img src=x onerror=alert(1)>');
  await page.keyboard.press('Escape');

  const { text, name } = await exported(page);
  expect(name).toMatch(/^[\p{L}\p{N}-]+\.svg$/u);
  const inert = await page.evaluate((svg) => {
    const file = new DOMParser().parseFromString(svg, 'image/svg+xml');
    const all = [...file.querySelectorAll('*')];
    return {
      error: file.querySelector('parsererror')?.textContent ?? null,
      tags: [...new Set(all.map((e) => e.localName))].sort(),
      attributes: [...new Set(all.flatMap((e) => e.getAttributeNames()))].sort(),
      links: all.flatMap((e) =>
        [...e.attributes]
          .map(({ value }) => value)
          .filter((v) => /url\((?!#)|https?:(?!\/\/www\.w3\.org\/2000\/svg)/.test(v)),
      ),
    };
  }, text);
  expect(inert.error).toBeNull();
  expect(inert.links).toEqual([]);
  // What plain SVG needs, and nothing that acts, styles or fetches.
  for (const tag of inert.tags)
    expect([
      'circle',
      'clipPath',
      'defs',
      'desc',
      'g',
      'metadata',
      'path',
      'rect',
      'svg',
      'text',
      'title',
      'tspan',
      'simmerline-sheet',
    ]).toContain(tag);
  expect(inert.attributes.filter((a) => /^on|^style$|^class$|href|^data-/.test(a))).toEqual([]);
  expect((sheetFromSvg(text) as { title: string }).title).toBe(hostile);

  await page.getByRole('button', { name: 'Sheets' }).click();
  await page.locator('.kept').waitFor();
  expect(await page.locator('img').count()).toBe(0);
  expect(asked).toBe(0);
  expect([troubles, strangers]).toEqual([[], []]);
  await context.close();
});

it('the content policy stands and nothing is asked of any other host', async () => {
  const { page, context, troubles, strangers } = await h.open('');
  await page.locator('.demo svg text').first().waitFor();
  const policy = await page
    .locator('meta[http-equiv=Content-Security-Policy]')
    .getAttribute('content');
  expect(policy).toContain("default-src 'none'");
  expect(policy).not.toMatch(/unsafe|\*|https?:/);
  // It bites: code in a string, markup with handlers and another host are all refused.
  const blocked = await page.evaluate(async () => {
    const seen: string[] = [];
    document.addEventListener('securitypolicyviolation', (e) => seen.push(e.effectiveDirective));
    const holder = document.createElement('div');
    holder.innerHTML = '<img src=x:y onerror="document.title=1">';
    document.body.append(holder);
    const script = document.createElement('script');
    script.textContent = 'document.title = "run"';
    document.body.append(script);
    await fetch('https://elsewhere.invalid/').catch(() => undefined);
    await new Promise((resolve) => requestAnimationFrame(() => setTimeout(resolve)));
    return { seen: [...new Set(seen)].sort(), title: document.title };
  });
  expect(blocked.title).toBe('Simmerline');
  expect(blocked.seen).toEqual(expect.arrayContaining(['connect-src', 'script-src-elem']));
  expect(strangers.filter((url) => !url.startsWith('x:'))).toEqual([]);
  // The refusals just provoked are the only troubles.
  expect(
    troubles.filter(
      (t) => !/Content Security Policy|elsewhere\.invalid|x:y|Failed to load/.test(t),
    ),
  ).toEqual([]);
  await context.close();
});

it('works on without a net once it is loaded', async () => {
  const { page, context, troubles, strangers } = await h.open('?demo=retort');
  await drawn(page);
  const loaded = (name: string) =>
    page.evaluate(
      (n) => performance.getEntriesByType('resource').some((r) => r.name.includes(n)),
      `/${name}-`,
    );
  await expect.poll(() => loaded('carbon-dioxide'), { timeout: 5000 }).toBe(true);
  await context.setOffline(true);
  await fill(page, 'temperature of A5', '80 °C');
  expect(number((await cells(page, 'A5'))[0]!)).toBe(80);
  await page.getByRole('button', { name: 'Add a state' }).click();
  await page.getByLabel('a reading of your gauge or thermometer').fill('1 MPa(a)');
  await expect
    .poll(() => page.locator('.reading .answer').textContent())
    .toContain('boils at 179.9');
  await drawn(page);
  const { text } = await exported(page);
  expect((sheetFromSvg(text) as { items: unknown[] }).items).toHaveLength(2);
  // A new map, of a substance that was not open before.
  await page.getByRole('button', { name: 'Sheets' }).click();
  await page.getByLabel('substance', { exact: true }).selectOption('carbon-dioxide');
  await page.getByRole('button', { name: 'Draw it' }).click();
  await drawn(page);
  await expect.poll(() => page.locator('.page svg').textContent()).toContain('DRY ICE');
  expect([troubles.filter((t) => !t.includes('ERR_INTERNET_DISCONNECTED')), strangers]).toEqual([
    [],
    [],
  ]);
  await context.close();
});
