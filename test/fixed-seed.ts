/** Properties draw the same cases every time, so that a change is judged by what it changes; PROPERTY_SEED looks elsewhere. */
import fc from 'fast-check';

fc.configureGlobal({ seed: Number(process.env['PROPERTY_SEED'] ?? 20_261_201) });
