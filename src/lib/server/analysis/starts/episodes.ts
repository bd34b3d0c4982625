/** What an episode needs of each start, in time order; ms and seconds. */
export type Try = { startedAt: number; restSeconds: number | null; outlived: boolean };

/**
 * Episodes: from a first try until a start outlives the start-up window, or the rest before the next start reaches the
 * first-start rest. Named by the first try's start time. A start whose rest is unknown opens a new one.
 */
export function episodesOf(tries: readonly Try[], firstStartRest: number): { episode: number; tryNumber: number }[] {
	let episode = NaN;
	let tryNumber = 0;
	let open = false;
	return tries.map((each) => {
		if (open && each.restSeconds !== null && each.restSeconds < firstStartRest) tryNumber++;
		else {
			episode = each.startedAt;
			tryNumber = 1;
		}
		open = !each.outlived;
		return { episode, tryNumber };
	});
}
