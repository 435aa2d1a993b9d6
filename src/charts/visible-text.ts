/** Text of a study made fit to show: characters that are invisible, reorder what stands beside them or break XML are shown by their code. */

/** Controls, format characters (marks and overrides of direction among them), separators of lines and paragraphs, lone surrogates, noncharacters. */
const hidden = /(?![\t\n\r\u200c\u200d])[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}\p{Noncharacter_Code_Point}]/gu;

/** The same text with each such character as `[U+202E]`; tabs, line ends and the joiners inside emoji and words stay. */
export function visibleText(text: string): string {
  return text.replace(hidden, (character) => `[U+${(character.codePointAt(0) as number).toString(16).toUpperCase().padStart(4, '0')}]`);
}

/** Visible text of at most `most` characters, an ellipsis where it was cut. */
export function shortText(text: string, most: number): string {
  const characters = Array.from(visibleText(text));
  return characters.length <= most ? characters.join('') : `${characters.slice(0, most - 1).join('')}…`;
}
