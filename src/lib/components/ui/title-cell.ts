/** One cell of a title block: a label over its value. `words` values are set in the sans, figures and tags in mono. */
export type TitleCell = { label: string; value: string; words?: boolean };
