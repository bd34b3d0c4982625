/** A unit as the search knows it. */
export type Findable = { href: string; tag: string; site: string };

type UnitRow = { id: string; siteId: string; tag: string };
type SiteRow = { id: string; name: string };

/** Every unit the person may see, with its site's name. @throws Error when the API refuses */
export async function loadFindable(fetcher: typeof fetch): Promise<Findable[]> {
	const [units, sites] = await Promise.all([
		get<{ units: UnitRow[] }>(fetcher, '/api/units?limit=5000'),
		get<{ sites: SiteRow[] }>(fetcher, '/api/sites?limit=5000')
	]);
	const names = new Map(sites.sites.map((site) => [site.id, site.name]));
	return units.units.map((unit) => ({ href: `/units/${unit.id}`, tag: unit.tag, site: names.get(unit.siteId) ?? '' }));
}

async function get<T>(fetcher: typeof fetch, path: string): Promise<T> {
	const answer = await fetcher(path);
	if (!answer.ok) throw new Error(`${path} answered ${answer.status}`);
	return (await answer.json()) as T;
}

/** Units whose tag and site hold every word of the text, best first: tags that begin with it, then the rest; ten at most. */
export function findUnits(all: readonly Findable[], text: string): Findable[] {
	const words = text.toLowerCase().split(/\s+/).filter(Boolean);
	if (words.length === 0) return [];
	const first = words[0] ?? '';
	return all
		.filter((entry) => {
			const name = `${entry.tag} ${entry.site}`.toLowerCase();
			return words.every((word) => name.includes(word));
		})
		.sort((a, b) => rank(a, first) - rank(b, first))
		.slice(0, 10);
}

function rank(entry: Findable, word: string): number {
	if (entry.tag.toLowerCase().startsWith(word)) return 0;
	return entry.site.toLowerCase().startsWith(word) ? 1 : 2;
}
