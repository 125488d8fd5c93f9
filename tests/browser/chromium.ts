/** Path of the Chromium to test in: CHROMIUM_PATH where set, else the one that a package unpacks. */
export async function chromiumPath(): Promise<string> {
  if (process.env.CHROMIUM_PATH) return process.env.CHROMIUM_PATH;
  return (await import('@sparticuz/chromium')).default.executablePath();
}

export const chromiumArguments = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
