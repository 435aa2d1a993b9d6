/** The version of layshaft, as the package states it. */
import manifest from '../../package.json' with { type: 'json' };

/** Three numbers: `0.1.0`. */
export const version: string = manifest.version;
