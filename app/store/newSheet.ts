import type { Sheet } from '../../core/sheet/schema.ts';

/** What a blank start knows: substance, place (a canonical altitude or barometer reading), kind. */
export interface Start {
  readonly substance: string;
  readonly place: { readonly altitude: string } | { readonly barometer: string };
  readonly kind: 'gauge' | 'absolute';
  readonly siteName: string;
}

/** A sheet with a whole map and nothing on it yet. */
export function newSheet({ substance, place, kind, siteName }: Start): Sheet {
  return {
    version: 1,
    made: { tool: __SIMMERLINE_VERSION__, formulations: {} },
    title: '',
    pressureKind: kind,
    substances: [substance],
    sites: [{ id: 'site-1', name: siteName, ...place }],
    items: [],
    views: [
      {
        id: 'main',
        page: { width: '190 mm', height: '132 mm' },
        temperature: { unit: '°C', scale: 'linear', range: null },
        pressure: { unit: 'bar', kind: 'absolute', scale: 'logarithmic', range: null },
        second: kind === 'gauge' ? { unit: 'bar', kind: 'gauge', site: 'site-1' } : null,
        fields: 'full',
        colours: 'colour',
        hidden: [],
        labelOffsets: {},
      },
    ],
    data: {},
  };
}
