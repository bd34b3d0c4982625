import type { Provenance } from '$lib/model/unit';

/** One statement of the method: what is computed or assumed, how, and where it comes from. */
export type MethodEntry = {
	name: string;
	says: string;
	formula?: string;
	/** Whose number or rule it is. */
	origin: Provenance;
	/** The published source, exactly; wherever `origin` is `source`. */
	source?: string;
};

export type MethodSection = { key: string; title: string; lead: string; entries: readonly MethodEntry[] };
