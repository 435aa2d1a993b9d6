import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';
import { afterAll, describe, expect, test } from 'vitest';
import { type DesignBatch, designsPerTask, evaluateInThreads } from '../../src/run/design-pool.ts';
import { smallStudyText, studyOf } from './small-study.ts';

const folder = mkdtempSync(join(tmpdir(), 'layshaft-pool-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const data = { study: studyOf(smallStudyText()), columns: [] };

/** A thread made up for one test. */
function thread(name: string, source: string): URL {
  const path = join(folder, `${name}.mjs`);
  writeFileSync(path, source);
  return pathToFileURL(path);
}

async function all(count: number, workers: number, url: URL): Promise<DesignBatch[]> {
  const batches: DesignBatch[] = [];
  for await (const batch of evaluateInThreads(data, count, workers, url)) batches.push(batch);
  return batches;
}

test('batches come in the order of design numbers though later ones are done first', async () => {
  const url = thread('uneven', 'export default ({ first }) => new Promise((done) => setTimeout(() => done(new Float64Array(0)), first === 1 ? 150 : 1));');
  const batches = await all(4 * designsPerTask + 7, 2, url);
  expect(batches.map(({ first, count }) => [first, count])).toEqual([
    ...[0, 1, 2, 3].map((task) => [task * designsPerTask + 1, designsPerTask]),
    [4 * designsPerTask + 1, 7],
  ]);
});

describe('a thread that fails as it starts', () => {
  // The pool gives a single task to the thread made first; the other one has none in hand.
  test.each(['first', 'second'])('ends the run in a problem, be it the one with a task or the idle one (%s)', async (which) => {
    const probe = new Worker('', { eval: true });
    const firstOfPool = probe.threadId + 1;
    await probe.terminate();
    const url = thread(
      `failing-${which}`,
      `import { threadId } from 'node:worker_threads';
      if ((threadId === ${firstOfPool}) === ${which === 'first'}) throw new Error('no such memory');
      export default () => new Promise((done) => setTimeout(() => done(new Float64Array(0)), 1500));`,
    );
    await expect(all(1, 2, url)).rejects.toMatchObject({ name: 'RunProblem', message: expect.stringContaining('no such memory') });
  });
});

test('a thread that ends in the middle of its work is told with the designs that were in hand', async () => {
  const url = thread('ending', `export default ({ first }) => (first > 1 ? process.exit(3) : new Float64Array(0));`);
  await expect(all(2 * designsPerTask, 1, url)).rejects.toMatchObject({
    name: 'RunProblem',
    message: expect.stringMatching(new RegExp(`designs (1|${designsPerTask + 1}) to ${2 * designsPerTask}:`, 'u')),
  });
});

test('a fault of ours in one design is thrown with its number', async () => {
  const url = thread('fault', `export default () => ({ fault: 'a bug', designNumber: 7 });`);
  await expect(all(10, 1, url)).rejects.toThrow('design 7: a bug');
});
