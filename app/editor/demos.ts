/** Demo sheets in public/demos, in the order shown. */
export const demos = ['retort', 'carbon-dioxide', 'jam-pan', 'ammonia', 'ices'] as const;

/** The text of a demo sheet, from this page's own folder. */
export async function demoText(name: string): Promise<string> {
  const answer = await fetch(new URL(`demos/${name}.json`, document.baseURI));
  if (!answer.ok) throw new Error(`${name}: ${answer.status}`);
  return answer.text();
}
