/** A file name from a title: letters and digits of any script, the rest as single hyphens. */
export function fileName(title: string, ending: string): string {
  const stem = title
    .normalize('NFC')
    .replace(/[^\p{L}\p{N}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 80);
  return `${stem || 'sheet'}.${ending}`;
}

/** Hands a text to the browser as a download. */
export function download(name: string, text: string, type: string): void {
  const url = URL.createObjectURL(new Blob([text], { type }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  // The download has its own hold on the blob by the next turn.
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}
