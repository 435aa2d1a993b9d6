import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shortText, visibleText } from '../../src/charts/visible-text.ts';

describe('text of a study made visible', () => {
  it('shows marks and overrides of direction, controls, separators and lone surrogates by their code', () => {
    expect(visibleText('a\u202eb')).toBe('a[U+202E]b');
    expect(visibleText('\u0000\u0007\u2028\ufeff\ud800x')).toBe('[U+0000][U+0007][U+2028][U+FEFF][U+D800]x');
  });

  it('leaves words of any script, emoji, tabs and line ends alone', () => {
    const text = 'Bahía Süd, عربية, 港, 👩‍🔧\tline\nline\r\n';
    expect(visibleText(text)).toBe(text);
  });

  it('never leaves a hidden character, and is done after once', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const shown = visibleText(text);
        expect(shown).not.toMatch(/[\u200e\u200f\u202a-\u202e\u2066-\u2069]/u);
        expect(Array.from(shown).filter((character) => character < ' ' && !'\t\n\r'.includes(character))).toEqual([]);
        expect(visibleText(shown)).toBe(shown);
      }),
    );
  });

  it('cuts by characters, never within one', () => {
    expect(shortText('🚚🚚🚚🚚', 3)).toBe('🚚🚚…');
    expect(shortText('quay', 4)).toBe('quay');
  });
});
