/** What is printed to be typed again. */
import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { typed } from '../../src/cli/terminal.ts';

describe('a file name to be typed', () => {
  it.each(['my-van.yaml', 'studies/kai_größe.yaml', './a.b/c.yaml'])('stands as it is: %s', (path) => {
    expect(typed(path)).toBe(path);
  });

  it.each(['my van.yaml', "driver's van.yaml", 'a$HOME.yaml', 'a"b`c`.yaml', "it's $5 (new).yaml", 'a;b&c.yaml', '~.yaml', 'back slash\\.yaml'])(
    'comes back from a shell as it was: %s',
    (path) => {
      expect(execFileSync('sh', ['-c', `printf %s ${typed(path)}`], { encoding: 'utf8' })).toBe(path);
    },
  );
});
