import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const style = readFileSync(new URL('../../../src/http/pages/page.css', import.meta.url), 'utf8');
const [light, dark] = [...style.matchAll(/:root \{([^}]*)\}/g)].map(([, rules]) =>
  Object.fromEntries(
    [...rules.matchAll(/--([\w-]+): (#[\da-f]{6});/g)].map(([, name, value]) => [name, value]),
  ),
);

/** Relative luminance and contrast ratio: WCAG 2.2, definitions of both. */
function luminance(colour: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const share = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}
function contrast(a: string, b: string): number {
  const [darker, lighter] = [luminance(a), luminance(b)].toSorted((x, y) => x - y);
  return (lighter + 0.05) / (darker + 0.05);
}

describe('the colours of the page', () => {
  it('have the contrast that the rule is known for', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 10);
    // The lightest grey that passes on white, a value often quoted (from memory).
    expect(contrast('#767676', '#ffffff')).toBeCloseTo(4.54, 2);
  });

  // WCAG 2.2, success criterion 1.4.3 (AA): at least 4.5 for text.
  it.each(['ink', 'soft', 'link'])('keep text in --%s readable on every ground, in both themes', (text) => {
    for (const colours of [light, dark]) {
      for (const ground of ['paper', 'card', 'code', 'care-paper']) {
        expect(contrast(colours[text], colours[ground])).toBeGreaterThanOrEqual(4.5);
      }
    }
  });

  it('are those of this service: nothing is fetched from elsewhere', () => {
    expect(style).not.toMatch(/url\(|@import|@font-face/);
  });
});
