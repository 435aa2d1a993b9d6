import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { firstOrder, frontTable, sortedFront } from '../../src/page/front-section.ts';
import { inventedReport } from '../charts/invented-report.ts';

const data = inventedReport();

describe('the order of the front', () => {
  it('is by any column either way, with what does not exist last and equals by number', () => {
    fc.assert(
      fc.property(fc.integer({ min: -1, max: data.columns.length - 1 }), fc.boolean(), fc.integer({ min: 1, max: 5 }), (column, descending, every) => {
        const holes = {
          ...data,
          designs: data.designs.map((design) =>
            design.number % (every + 1) === 0 ? { ...design, values: design.values.map((value, at) => (at === column ? null : value)) } : design,
          ),
        };
        const rows = sortedFront(holes, { column, descending, all: true });
        const keys = rows.map((design) => (column < 0 ? design.number : (design.values[column] ?? null)));
        for (const [index, key] of keys.slice(1).entries()) {
          const before = keys[index] ?? null;
          if (before === null) expect(key).toBeNull();
          else if (key !== null) expect(descending ? before >= key : before <= key).toBe(true);
          if (before === key) expect(rows[index]!.number).toBeLessThan(rows[index + 1]!.number);
        }
        expect(new Set(rows.map(({ number }) => number)).size).toBe(data.counts.shownFront);
      }),
    );
  });

  it('starts with the better end of the first objective', () => {
    expect(data.columns[firstOrder(data).column]?.name).toBe('stops.batteryEnergy');
    expect(firstOrder(data).descending).toBe(false);
  });
});

describe('the table of the front', () => {
  const heads = (report: typeof data) => [...frontTable(report, firstOrder(report)).text.matchAll(/data-sort="(-?\d+)"/gu)].map(([, column]) => Number(column));
  const at = data.columns.findIndex(({ name }) => name === 'stops.offTrace');
  const implied = { ...data, requirements: data.requirements.map((each) => (each.metric === 'stops.offTrace' ? { ...each, implied: true } : each)) };
  const withShare = (share: number) => ({
    ...implied,
    designs: implied.designs.map((design) => ({ ...design, values: design.values.map((value, index) => (index === at ? share : value)) })),
  });

  it('leaves out what every design meets by being there: a cycle followed throughout', () => {
    expect(at).toBeGreaterThanOrEqual(0);
    expect(heads(withShare(0))).not.toContain(at);
    expect(heads(withShare(0.01))).toContain(at);
  });
});
