/** Files that are no studies: each ends in a clear message and status 2, in a heap too small for carelessness. */
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { emptyFolder, layshaft } from './built-program.ts';

// Each test starts the program anew, several times over: slow where the machine is busy.
vi.setConfig({ testTimeout: 180_000 });

const folder = emptyFolder();
const at = (name: string) => join(folder.path, name);
/** A 50 MB text as a JavaScript string would not fit twice. */
const smallHeap = ['--max-old-space-size=96'];

const bomb = ['a0: &a0 [x, x, x, x, x, x, x, x, x]', ...Array.from({ length: 12 }, (_, k) => `a${k + 1}: &a${k + 1} [${Array(9).fill(`*a${k}`).join(', ')}]`)];

const files: readonly { readonly name: string; readonly content: string | Buffer; readonly says: RegExp }[] = [
  { name: 'bomb.yaml', content: `${bomb.join('\n')}\n`, says: /alias|anchor/i },
  { name: 'merge.yaml', content: 'base: &b { kerbMass: 1 kg }\nvehicle:\n  <<: *b\n', says: /<<|alias|anchor/i },
  { name: 'proto.yaml', content: '__proto__: { polluted: yes }\nvehicle: { __proto__: { kerbMass: 1 kg } }\n', says: /__proto__/ },
  { name: 'deep.yaml', content: `vehicle: ${'['.repeat(20_000)}${']'.repeat(20_000)}\n`, says: /deep|level|nest/i },
  { name: 'deep-map.yaml', content: `vehicle: ${'{a: '.repeat(20_000)}1${'}'.repeat(20_000)}\n`, says: /deep|level|nest/i },
  { name: 'large.yaml', content: `title: ${'x'.repeat(50_000_000)}\n`, says: /bytes|kB/ },
  { name: 'binary.yaml', content: Buffer.from(Uint8Array.from({ length: 4096 }, (_, k) => (k * 97) % 256)), says: /text/ },
  { name: 'zero.yaml', content: Buffer.alloc(1000), says: /text/ },
  { name: 'empty.yaml', content: '', says: /empty/ },
  { name: 'list.yaml', content: '- 1\n- 2\n', says: /expected/ },
  { name: 'unclosed.yaml', content: 'vehicle: { kerbMass: 1780 kg\n', says: /unclosed\.yaml:\d+:\d+/ },
  { name: 'duplicate.yaml', content: 'title: a\ntitle: b\n', says: /twice|again|once|already/i },
  { name: 'two.yaml', content: 'title: a\n---\ntitle: b\n', says: /second document/ },
  { name: 'escape.yaml', content: 'titel\u001b[31m: a\n', says: /control/ },
];

beforeAll(() => {
  mkdirSync(at('folder.yaml'));
  for (const { name, content } of files) writeFileSync(at(name), content);
});
afterAll(() => folder.remove());

describe('hostile files', () => {
  for (const command of ['check', 'sheet', 'run']) {
    it.each(files)(`${command} refuses $name`, async ({ name, says }) => {
      const { status, stdout, stderr } = await layshaft([command, name], { cwd: folder.path, node: smallHeap });
      expect(stderr).toMatch(says);
      expect(stderr).not.toMatch(/fault in layshaft|\n {4}at /);
      expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
      expect(stderr.length).toBeLessThan(60_000);
      expect(stderr).not.toContain('\u001b');
    });

    it.each([
      ['a missing file', 'missing.yaml', /missing\.yaml: there is no such file/],
      ['a folder', 'folder.yaml', /folder\.yaml: it is a folder/],
    ])(`${command} refuses %s`, async (_what, name, says) => {
      const { status, stdout, stderr } = await layshaft([command, name], { cwd: folder.path });
      expect(stderr).toMatch(says);
      expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
    });
  }
});
