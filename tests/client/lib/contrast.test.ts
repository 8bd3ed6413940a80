import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

/** Relative luminance of an sRGB colour #rrggbb, WCAG 2.2 "relative luminance". */
function luminance(colour: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const channel = parseInt(colour.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

/** Contrast ratio, WCAG 2.2 "contrast ratio": (L1 + 0.05) / (L2 + 0.05). */
function contrast(one: string, other: string): number {
  const [light, dark] = [luminance(one), luminance(other)].sort((a, b) => b - a) as [
    number,
    number,
  ];
  return (light + 0.05) / (dark + 0.05);
}

const css = readFileSync('src/index.css', 'utf8');

function tokensOf(theme: string): Record<string, string> {
  const block = css.split(`[data-theme='${theme}'] {`)[1]?.split('}')[0] ?? '';
  return Object.fromEntries(
    [...block.matchAll(/--([\w-]+): (#[0-9a-f]{6});/g)].map((found) => [found[1], found[2]]),
  ) as Record<string, string>;
}

const TEXTS = ['ink', 'ink-soft', 'signal-text', 'clear', 'caution'];
const GROUNDS = ['ground', 'sheet'];
/** Edges of controls, marks and the focus ring, which people have to see to use the thing. */
const GRAPHICS = ['pencil', 'signal', 'clear', 'caution', 'focus', 'ink'];

describe('contrast formula', () => {
  it('gives the ratios WCAG names: 21 for black on white, 1 for equal colours', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 10);
    expect(contrast('#777777', '#777777')).toBe(1);
    // #767676 on white is the usual example of grey that just passes 4.5.
    expect(contrast('#767676', '#ffffff')).toBeGreaterThan(4.5);
    expect(contrast('#777777', '#ffffff')).toBeLessThan(4.5);
  });
});

describe.each(['paper', 'chalk'])('theme %s', (theme) => {
  const tokens = tokensOf(theme);
  const ratio = (one: string, other: string) => contrast(tokens[one] ?? '', tokens[other] ?? '');

  it('defines every colour', () => {
    for (const name of [...TEXTS, ...GROUNDS, ...GRAPHICS, 'rule', 'on-signal']) {
      expect(tokens[name], name).toMatch(/^#/);
    }
  });

  it.each(GROUNDS.flatMap((ground) => TEXTS.map((text) => [text, ground] as const)))(
    '%s on %s reads as text (1.4.3: 4.5)',
    (text, ground) => {
      expect(ratio(text, ground)).toBeGreaterThanOrEqual(4.5);
    },
  );

  it.each(GROUNDS.flatMap((ground) => GRAPHICS.map((mark) => [mark, ground] as const)))(
    '%s on %s is seen as a mark (1.4.11: 3)',
    (mark, ground) => {
      expect(ratio(mark, ground)).toBeGreaterThanOrEqual(3);
    },
  );

  it('filled buttons read: sheet on ink, on-signal on signal', () => {
    expect(ratio('sheet', 'ink')).toBeGreaterThanOrEqual(4.5);
    expect(ratio('sheet', 'ink-soft')).toBeGreaterThanOrEqual(4.5);
    expect(ratio('on-signal', 'signal')).toBeGreaterThanOrEqual(4.5);
  });
});
