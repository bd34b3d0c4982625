import { accuracySchema } from '$lib/model/accuracy';
import { METHOD_VERSION } from '$lib/model/circuit-input';
import measured from '$lib/model/measured-accuracy.json';
import { SUSPECT_WORDS } from '$lib/model/words';
import type { Method } from '$lib/model/wire/method';
import { METHOD_SECTIONS } from '$lib/server/analysis/method-declarations';
import { CAUTIONS, SUSPECT_TABLE } from '$lib/server/analysis/suspects';

/** A clue's key as words: "stall-near-full" reads "stall near full". */
const words = (key: string): string => key.replaceAll('-', ' ');

/** The method as the Method page and the API give it, made from the tables the analysis itself runs on. */
export function describeMethod(): Method {
	return {
		version: METHOD_VERSION,
		sections: METHOD_SECTIONS.map((section) => ({
			...section,
			entries: section.entries.map((entry) => ({ ...entry }))
		})),
		suspects: SUSPECT_TABLE.map((row) => ({
			key: row.key,
			name: SUSPECT_WORDS[row.key],
			clues: row.clues.map(({ key, direction, weight }) => ({ words: words(key), direction, weight })),
			check: row.check.title
		})),
		accuracy: accuracySchema.parse(measured),
		cautions: Object.values(CAUTIONS)
	};
}
