/** Tyre size text -> dynamic rolling radius. */
import { tyreRadiusM } from '../vehicle/tyre.ts';

const INCH_M = 0.0254;
const RADIAL = /^(?:P|LT)?\s*(\d{3})\s*\/\s*(\d{2,3})\s*(?:ZR|R)\s*(\d{2}(?:\.5)?)\s*C?$/iu;

/**
 * Rolling radius of a radial tyre such as `215/65 R16` (width mm / aspect % R rim inch), in m; null where the text
 * is no such size.
 */
export function rollingRadiusM(size: string): number | null {
  const parts = RADIAL.exec(size.trim());
  if (parts === null) return null;
  const [widthMm, aspectPct, rimInch] = parts.slice(1).map(Number) as [number, number, number];
  return tyreRadiusM(widthMm / 1000, aspectPct / 100, rimInch * INCH_M);
}
