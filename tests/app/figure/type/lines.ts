import type { TextRun } from '../../../../app/figure/scene/scene.ts';

/** Lines of text as figures carry them, in all three faces. */
export const lines: readonly (readonly TextRun[])[] = [
  [{ text: 'boiling line of water' }],
  [{ text: 'LIQUID WATER' }],
  [{ text: 'vessel rating 2.9 bar(g) at 143 °C' }],
  [{ text: '70 kPa above its boiling pressure' }],
  [{ text: 'A1 A2 B1 B3 C12', bold: true }],
  [{ text: 'pressure held while the product cools', bold: true }],
  [{ text: 'temperature of the product', italic: true }],
  [{ text: '128.7 ± 0.4 °C, −0.5 bar, 100\u2009000 kPa, 5 ≤ x ≈ ∞ · × ‰ – — …' }],
  [{ text: 'Dampfdruckkurve, Übergänge, pression d’ébullition, λ ρ Δ' }],
];
