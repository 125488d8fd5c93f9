import type { Step } from '../../core/process/steps/index.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { random } from '../random.ts';

/** Twenty states and five paths of twenty steps, water between cold liquid and hot steam. */
export function heavySheet(): Sheet {
  const r = random(31);
  const T = (): string => `${(30 + 140 * r()).toFixed(1)} °C`;
  const p = (): string => `${(0.2 + 5 * r()).toFixed(2)} bar(g)`;
  const step = (i: number): Step => {
    const common = { id: `s${i}`, time: `${5 + i} min` };
    switch (i % 4) {
      case 0:
        return { ...common, kind: 'constantPressure', end: { T: T() } };
      case 1:
        return { ...common, kind: 'constantTemperature', end: { p: p() } };
      case 2:
        return { ...common, kind: 'ramp', end: { T: T(), p: p() } };
      default:
        return { ...common, kind: 'hold', end: {} };
    }
  };
  return {
    version: 1,
    made: { tool: '0', formulations: {} },
    title: 'Heavy sheet',
    pressureKind: 'gauge',
    substances: ['water'],
    sites: [
      {
        id: 'works',
        name: 'Works',
        altitude: '500 m',
        gauge: { class: 1.6, low: '0 bar(g)', high: '10 bar(g)' },
        probe: '0.5 K',
      },
    ],
    items: [
      ...Array.from({ length: 20 }, (_, i) => ({
        id: `state-${i}`,
        kind: 'state' as const,
        tag: `${i + 1}`,
        name: `sample ${i + 1}`,
        T: T(),
        p: p(),
      })),
      ...Array.from({ length: 5 }, (_, i) => ({
        id: `path-${i}`,
        kind: 'path' as const,
        tag: 'ABCDE'[i]!,
        name: `run ${i + 1}`,
        start: { T: '22 °C', p: p() },
        steps: Array.from({ length: 20 }, (_, k) => step(k)),
      })),
    ],
    views: [
      {
        id: 'main',
        page: { width: '190 mm', height: '132 mm' },
        temperature: { unit: '°C', scale: 'linear', range: null },
        pressure: { unit: 'bar', kind: 'gauge', scale: 'linear', range: null },
        second: null,
        fields: 'faint',
        colours: 'colour',
        hidden: [],
        labelOffsets: {},
      },
    ],
    data: {},
  };
}
