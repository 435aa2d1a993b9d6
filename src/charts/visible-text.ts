/** Text of a study made fit to show: characters that are invisible, reorder what stands beside them or break XML are shown by their code. */

/** Controls but tab and line feed, line and paragraph separators, marks and overrides of direction, zero-width characters, lone surrogates, noncharacters. */
const hidden = /[\0-\x08\x0b-\x1f\x7f-\x9f\xad\u061c\u180e\u200b\u200e\u200f\u2028-\u202e\u2060-\u206f\ufeff\ufff9-\uffff]|\p{Surrogate}/gu;

/** The same text with each such character as `[U+202E]`; joiners inside emoji stay. */
export function visibleText(text: string): string {
  return text.replace(hidden, (character) => `[U+${(character.codePointAt(0) as number).toString(16).toUpperCase().padStart(4, '0')}]`);
}

/** Visible text of at most `most` characters, an ellipsis where it was cut. */
export function shortText(text: string, most: number): string {
  const characters = Array.from(visibleText(text));
  return characters.length <= most ? characters.join('') : `${characters.slice(0, most - 1).join('')}…`;
}
