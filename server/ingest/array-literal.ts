/**
 * Gathers one column of a batch as PostgreSQL's array text, element by element. A column without a single value is
 * written as an empty array: `unnest` fills shorter arrays with nulls, so absent optional fields cost nothing.
 */
export type ColumnText = {
  readonly addNumber: (value: number | undefined) => void;
  readonly addText: (value: string | undefined) => void;
  readonly toParameter: () => string;
};

/** An empty column. */
export function createColumnText(): ColumnText {
  let text = '';
  let pendingNulls = 0;
  const add = (element: string): void => {
    while (pendingNulls > 0) {
      text += text === '' ? 'NULL' : ',NULL';
      pendingNulls -= 1;
    }
    text += text === '' ? element : `,${element}`;
  };
  return {
    addNumber: (value) => {
      if (value === undefined) pendingNulls += 1;
      else add(`${value}`);
    },
    addText: (value) => {
      if (value === undefined) pendingNulls += 1;
      else add(quoteElement(value));
    },
    toParameter: () => `{${text}}`,
  };
}

/**
 * Quotes a text as an element of PostgreSQL's array text.
 *
 * @example quoteElement('a "b" \\ c') // '"a \\"b\\" \\\\ c"'
 */
export function quoteElement(value: string): string {
  return `"${value.replace(/[\\"]/g, '\\$&')}"`;
}
