import { describe, expect, it } from 'vitest';
import { checkText } from '../../../app/card/checkText.ts';
import { en } from '../../../app/words/en.ts';
import type { CheckResult } from '../../../core/checks/check.ts';

const check = (change: Partial<CheckResult>): CheckResult => ({
  kind: 'saturation',
  source: 'a table',
  provenance: 'recalled',
  at: { T: 300 },
  property: 'rhoL',
  value: 1416.77,
  printed: '1416.77 kg/m3',
  toleranceAbs: 0.0051,
  computed: 1416.7724,
  deviation: 0.0024,
  passes: true,
  ...change,
});

describe('checkText', () => {
  it('shows all three numbers in the printed unit, one digit beyond the print', () => {
    expect(checkText(check({}), en)).toEqual({
      state: 'T = 300 K',
      quantity: 'ρ′',
      published: '1416.77 kg/m³',
      computed: '1416.772',
      deviation: '0.0024',
      share: '47 %',
    });
  });

  it('turns SI back into the source’s unit', () => {
    const molar = { property: 'p', value: 68891, printed: '0.068891 MPa', toleranceAbs: 0.51 };
    const text = checkText(check({ ...molar, computed: 68890.9, deviation: -0.1 }), en);
    expect([text.computed, text.deviation]).toEqual(['0.0688909', '−1e-7']);
  });

  it('counts Celsius from its own zero', () => {
    const warm = { property: 'T', value: 239.56, printed: '-33.59 °C', toleranceAbs: 0.0051 };
    const text = checkText(check({ ...warm, computed: 239.563, deviation: 0.003 }), en);
    expect([text.published, text.computed]).toEqual(['−33.59 °C', '−33.587']);
  });

  it('says where a property is not defined', () => {
    const text = checkText(check({ computed: null, deviation: null, passes: false }), en);
    expect([text.computed, text.deviation, text.share]).toEqual(['not defined', 'not defined', '']);
  });
});
