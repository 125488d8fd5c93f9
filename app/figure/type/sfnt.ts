/** What this project reads of a TrueType font; lengths in font units. */
export interface Metrics {
  readonly unitsPerEm: number;
  readonly ascent: number;
  readonly descent: number;
  readonly capHeight: number;
  readonly xHeight: number;
  /** Advance width by code point. */
  readonly advances: ReadonlyMap<number, number>;
}

function tablesOf(font: DataView): Map<string, number> {
  const tables = new Map<string, number>();
  for (let i = 0; i < font.getUint16(4); i++) {
    const at = 12 + 16 * i;
    const tag = [0, 1, 2, 3].map((j) => String.fromCharCode(font.getUint8(at + j))).join('');
    tables.set(tag, font.getUint32(at + 8));
  }
  return tables;
}

function glyphsOf(font: DataView, cmap: number): Map<number, number> {
  const glyphs = new Map<number, number>();
  for (let i = 0; i < font.getUint16(cmap + 2); i++) {
    const sub = cmap + font.getUint32(cmap + 4 + 8 * i + 4);
    const format = font.getUint16(sub);
    if (format === 12) {
      for (let g = 0; g < font.getUint32(sub + 12); g++) {
        const at = sub + 16 + 12 * g;
        const [from, to, glyph] = [0, 4, 8].map((d) => font.getUint32(at + d)) as [
          number,
          number,
          number,
        ];
        for (let c = from; c <= to; c++) glyphs.set(c, glyph + c - from);
      }
    } else if (format === 4) {
      const twice = font.getUint16(sub + 6);
      for (let s = 0; s < twice; s += 2) {
        const to = font.getUint16(sub + 14 + s);
        const from = font.getUint16(sub + 16 + twice + s);
        const delta = font.getUint16(sub + 16 + 2 * twice + s);
        const rangeAt = sub + 16 + 3 * twice + s;
        const range = font.getUint16(rangeAt);
        for (let c = from; c <= to && c < 0xffff; c++) {
          const raw = range === 0 ? c : font.getUint16(rangeAt + range + 2 * (c - from));
          if (raw !== 0) glyphs.set(c, (raw + delta) & 0xffff);
        }
      }
    }
  }
  return glyphs;
}

/**
 * Metrics of a TrueType font: cmap formats 4 and 12, hmtx, hhea, OS/2.
 *
 * Source: ISO/IEC 14496-22 (Open Font Format).
 */
export function metricsOf(bytes: Uint8Array): Metrics {
  const font = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const tables = tablesOf(font);
  const table = (tag: string): number => {
    const at = tables.get(tag);
    if (at === undefined) throw new Error(`font has no table ${tag}`);
    return at;
  };
  const widths = font.getUint16(table('hhea') + 34);
  const advances = new Map<number, number>();
  for (const [c, glyph] of glyphsOf(font, table('cmap'))) {
    if (glyph === 0) continue;
    advances.set(c, font.getUint16(table('hmtx') + 4 * Math.min(glyph, widths - 1)));
  }
  return {
    unitsPerEm: font.getUint16(table('head') + 18),
    ascent: font.getInt16(table('hhea') + 4),
    descent: font.getInt16(table('hhea') + 6),
    capHeight: font.getInt16(table('OS/2') + 88),
    xHeight: font.getInt16(table('OS/2') + 86),
    advances,
  };
}
