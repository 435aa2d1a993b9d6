/** run.json: what a run says of itself, to people, to other programs and to the next run in its folder. */
import { z } from 'zod';

const count = z.number().int().nonnegative();

/** A run's record. Figures of designs stand under the column keys of parts and front.csv, in their units. */
const runRecord = z.looseObject({
  maker: z.literal('layshaft'),
  state: z.enum(['running', 'finished']),
  version: z.string(),
  node: z.string(),
  /** Study file as given, and its title. */
  study: z.string(),
  title: z.string(),
  started: z.iso.datetime(),
  /** Wall time, once finished. */
  seconds: z.number().nonnegative().optional(),
  counts: z.object({ designs: count, feasible: count, front: count, shownFront: count }).optional(),
});

/** A run's record. */
export type RunRecord = z.infer<typeof runRecord>;

/** Text of run.json. Throws on a record that does not hold what one must: a fault of ours. */
export function runRecordText(record: Omit<RunRecord, 'maker'>): string {
  return `${JSON.stringify(runRecord.parse({ ...record, maker: 'layshaft' }), null, 2)}\n`;
}

/** The record in a text of run.json; null where the text is no record of ours. */
export function readRunRecord(text: string): RunRecord | null {
  try {
    return runRecord.safeParse(JSON.parse(text)).data ?? null;
  } catch {
    return null;
  }
}
