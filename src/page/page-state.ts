/** What its reader has chosen on the page, and who wants to know when it changes. */

/** The choices. */
export interface PageChoices {
  /** Columns on the axes of the chart. */
  readonly x: number;
  readonly y: number;
  /** The chart frames all that passes and shows what was removed. */
  readonly wide: boolean;
  /** Design shown in full; null: none. */
  readonly pinned: number | null;
}

/** Holds the choices and tells of each change. */
export interface PageState {
  readonly choices: PageChoices;
  change(some: Partial<PageChoices>): void;
  /** Called after every change, in the order of subscription. */
  onChange(listener: (choices: PageChoices) => void): void;
}

/** State that starts with the given choices. */
export function createState(first: PageChoices): PageState {
  let choices = first;
  const listeners: ((choices: PageChoices) => void)[] = [];
  return {
    get choices() {
      return choices;
    },
    change(some) {
      choices = { ...choices, ...some };
      for (const listener of listeners) listener(choices);
    },
    onChange: (listener) => void listeners.push(listener),
  };
}
