/** Where a dotted name stands in the text of a study that was found right before. */
import { IssueList } from './issue.ts';
import { type LocatedMap, readLocated } from './located-text.ts';

/** Offsets by dotted name: `vary.gearing.ratio`, `requirements.ramp.grade`; of a name that does not stand, the nearest section above it. */
export function placesInText(text: string): (path: string) => number {
  const root = readLocated(text, new IssueList('', text));
  return (path) => (root === null ? 0 : offsetOf(root, path));
}

/** Names inside a section may have dots of their own. */
function offsetOf(root: LocatedMap, path: string): number {
  let offset = 0;
  let section = root;
  for (let rest = path; ; ) {
    const entry = section.entries.find(({ key }) => rest === key || rest.startsWith(`${key}.`));
    if (entry === undefined) return offset;
    offset = entry.at;
    if (entry.value.kind !== 'map' || rest === entry.key) return offset;
    section = entry.value;
    rest = rest.slice(entry.key.length + 1);
  }
}
