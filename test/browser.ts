/**
 * A real Chromium for tests, from the npm package alone: nothing has to be installed by hand. The browser is unpacked once
 * into node_modules/.cache, with the shared libraries and the typeface that the package brings, so that only a Linux on x64
 * with a C library is needed.
 */
import { existsSync, mkdirSync, mkdtempSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type Browser, chromium } from 'playwright-core';

const modules = fileURLToPath(new URL('../node_modules', import.meta.url));

/** Starts the browser; the caller closes it. */
export async function openBrowser(): Promise<Browser> {
  const home = await unpackedBrowser();
  return chromium.launch({
    executablePath: join(home, 'chromium'),
    args: ['--no-sandbox', '--disable-gpu', '--disable-dev-shm-usage', '--font-render-hinting=none'],
    env: { PATH: process.env['PATH'] ?? '', HOME: home, LD_LIBRARY_PATH: join(home, 'al2023', 'lib'), FONTCONFIG_FILE: join(home, 'fonts.conf') },
  });
}

/** The folder of the unpacked browser. Two tests that unpack at the same time do not meet: each has its own folder until it is complete. */
async function unpackedBrowser(): Promise<string> {
  const { version } = JSON.parse(readFileSync(join(modules, '@sparticuz', 'chromium', 'package.json'), 'utf8')) as { version: string };
  const cache = join(modules, '.cache');
  const home = join(cache, `chromium-${version}`);
  if (existsSync(join(home, 'fonts.conf'))) return home;
  mkdirSync(cache, { recursive: true });
  const fresh = mkdtempSync(join(cache, 'chromium-unpacking-'));
  await unpackInto(fresh);
  writeFileSync(join(fresh, 'fonts.conf'), fontSettings(home));
  try {
    renameSync(fresh, home);
  } catch (error) {
    rmSync(fresh, { recursive: true, force: true });
    if (!existsSync(join(home, 'fonts.conf'))) throw error;
  }
  return home;
}

/** The package unpacks into the temporary folder of the process, and its libraries only where it believes to be on the system they come from. */
async function unpackInto(folder: string): Promise<void> {
  const kept = { ...process.env };
  Object.assign(process.env, { TMPDIR: folder, AWS_EXECUTION_ENV: 'AWS_Lambda_nodejs20.x' });
  try {
    const { default: packaged } = await import('@sparticuz/chromium');
    packaged.setGraphicsMode = false;
    await packaged.executablePath();
  } finally {
    for (const name of ['TMPDIR', 'AWS_EXECUTION_ENV', 'LD_LIBRARY_PATH', 'FONTCONFIG_PATH', 'HOME']) {
      if (kept[name] === undefined) delete process.env[name];
      else process.env[name] = kept[name];
    }
  }
}

/** Typefaces of the package and of the machine, for a browser that lives in `home`. */
function fontSettings(home: string): string {
  const path = (name: string) => join(home, name).replaceAll('&', '&amp;').replaceAll('<', '&lt;');
  return `<?xml version="1.0"?>
<!DOCTYPE fontconfig SYSTEM "fonts.dtd">
<fontconfig>
  <dir>${path('fonts/fonts')}</dir>
  <dir>/usr/share/fonts</dir>
  <cachedir>${path('fonts-cache')}</cachedir>
</fontconfig>
`;
}
