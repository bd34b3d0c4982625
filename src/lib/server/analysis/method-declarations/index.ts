import { DERIVED_SECTION, TIME_SECTION } from './log-declared';
import { FIGURES_SECTION } from './figures-declared';
import { PROOF_SECTION, STATISTICS_SECTION } from './statistics-declared';
import { STARTS_SECTION } from './starts-declared';
import type { MethodSection } from './types';

export type { MethodSection } from './types';
export { readingOf } from './figures-declared';

/** The method as data, in the order it is read: from a log to a verdict. */
export const METHOD_SECTIONS: readonly MethodSection[] = [
	TIME_SECTION,
	DERIVED_SECTION,
	STARTS_SECTION,
	FIGURES_SECTION,
	STATISTICS_SECTION,
	PROOF_SECTION
];
