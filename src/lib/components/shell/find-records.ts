import type { Hit } from '$lib/model/wire/office';
import type { Findable } from './find-units';

/** The kinds of what can be found, in words. */
export const HIT_WORDS: Readonly<Record<Hit['kind'], string>> = {
	unit: 'unit',
	case: 'case',
	visit: 'visit',
	check: 'check',
	change: 'change'
};

/** What the server finds for a text; null when it cannot be asked. */
export async function searchRecords(fetcher: typeof fetch, text: string, signal: AbortSignal): Promise<Hit[] | null> {
	try {
		const answer = await fetcher(`/api/search?q=${encodeURIComponent(text.slice(0, 200))}`, { signal });
		return answer.ok ? ((await answer.json()) as { hits: Hit[] }).hits : null;
	} catch {
		return null;
	}
}

/**
 * Units at once, and beside them what the server found for a text that the present one goes on with: a list that
 * shrinks as one types, instead of one that empties at every letter.
 */
export function mergeHits(
	units: readonly Findable[],
	records: { text: string; hits: readonly Hit[] },
	text: string
): Hit[] {
	const own = units.map(({ href, tag, site }): Hit => ({ kind: 'unit', title: tag, detail: site, href }));
	const known = new Set(own.map((hit) => hit.href));
	const current = records.text !== '' && text.trim().toLowerCase().startsWith(records.text.toLowerCase());
	const words = text.toLowerCase().split(/\s+/).filter(Boolean);
	const exact = records.text.toLowerCase() === text.trim().toLowerCase();
	const rest = current
		? records.hits.filter(
				(hit) =>
					!known.has(hit.href) &&
					(exact || words.every((word) => `${hit.title} ${hit.detail}`.toLowerCase().includes(word)))
			)
		: [];
	return [...own, ...rest];
}
