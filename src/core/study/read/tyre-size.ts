/** Tyre size text -> dynamic rolling radius. */
import { tyreRadiusM } from '../../vehicle/tyre.ts';
import type { IssueList } from '../text/issue.ts';
import type { Found } from './read-places.ts';

const INCH_M = 0.0254;
const RADIAL = /^(?:P|LT)?\s*(\d{3})\s*\/\s*(\d{2,3})\s*(?:ZR|R)\s*(\d{2}(?:\.5)?)\s*C?(?:\s+\d{2,3}(?:\/\d{2,3})?\s?[A-Z]{1,2})?$/iu;

/**
 * Rolling radius of a radial tyre such as `215/65 R16` (width mm / aspect % R rim inch; load index and speed symbol may follow),
 * in m; null where the text is no such size.
 */
export function rollingRadiusM(size: string): number | null {
  const parts = RADIAL.exec(size.trim());
  if (parts === null) return null;
  const [widthMm, aspectPct, rimInch] = parts.slice(1).map(Number) as [number, number, number];
  return tyreRadiusM(widthMm / 1000, aspectPct / 100, rimInch * INCH_M);
}

/** Tells of a tyre size that is none. */
export function checkTyre({ texts }: Found, path: string, issues: IssueList): void {
  const tyre = texts.get('vehicle.tyre');
  if (tyre === undefined || rollingRadiusM(tyre.text) !== null) return;
  issues.error(tyre.at, path, {
    expected: 'the size of a radial tyre, such as 215/65 R16',
    found: tyre.text,
    hint: 'Write width in mm / aspect ratio in % R rim in inches; or give wheelRadius instead.',
  });
}
