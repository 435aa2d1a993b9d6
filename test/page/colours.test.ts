import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { fileInk } from '../../src/charts/ink.ts';

/** Contrast of two colours; formula: Web Content Accessibility Guidelines 2.2, definitions of contrast ratio and relative luminance. */
function contrast(one: string, other: string): number {
  const [light, dark] = [luminance(one), luminance(other)].sort((a, b) => b - a) as [number, number];
  return (light + 0.05) / (dark + 0.05);
}

function luminance(colour: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const share = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

const style = readFileSync(fileURLToPath(new URL('../../src/page/report.css', import.meta.url)), 'utf8');

/** The colours a scheme of the style sheet sets: the first block is light, the second dark. */
function scheme(index: number): Record<string, string> {
  const block = style.match(/:root \{[^}]+\}/gu)?.[index] ?? '';
  return Object.fromEntries([...block.matchAll(/--([a-z-]+): (#[0-9a-f]{6});/gu)].map(([, name, value]) => [name, value]));
}

const schemes = [
  ['files', { ...fileInk, 'on-proposal': fileInk.onProposal } as Record<string, string>],
  ['light', scheme(0)],
  ['dark', scheme(1)],
] as const;

describe('colours', () => {
  it.each(schemes)('of %s let text be read: at least 4.5 to 1', (_, ink) => {
    const grounds = [ink['paper'], ink['raised']].filter((ground) => ground !== undefined);
    for (const ground of grounds) {
      for (const name of ['text', 'quiet', 'front', 'proposal', 'reference', 'missed']) {
        if (ink[name] !== undefined) expect(contrast(ink[name], ground), name).toBeGreaterThanOrEqual(4.5);
      }
    }
    expect(contrast(ink['on-proposal'] as string, ink['proposal'] as string)).toBeGreaterThanOrEqual(4.5);
  });

  it.each(schemes)('of %s let marks be seen: at least 3 to 1 what there is to choose from, the rest faint but there', (_, ink) => {
    for (const name of ['front', 'proposal', 'reference']) expect(contrast(ink[name] as string, ink['paper'] as string), name).toBeGreaterThanOrEqual(3);
    for (const name of ['feasible', 'removed']) expect(contrast(ink[name] as string, ink['paper'] as string), name).toBeGreaterThanOrEqual(2);
  });
});
