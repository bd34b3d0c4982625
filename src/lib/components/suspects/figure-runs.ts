/** A sentence cut into words and figures, so that figures can be set in the mono. */
export type Run = { text: string; figure: boolean };

const FIGURE =
	/[−+]?\d[\d,.:]*\d(?:[\u00a0 ](?:°F\/min|°F|°C|K\/min|K|%|psia|psig|psi|kPa|gpm|L\/s|tons|kW|min|s|h)(?![\p{L}]))?|[−+]?\d(?:[\u00a0 ](?:°F|°C|K|%|psi|kPa|gpm|L\/s|kW|min|s|h)(?![\p{L}]))?/gu;

/** Cuts a sentence at its figures; joined again the runs are the sentence. */
export function figureRuns(sentence: string): Run[] {
	const runs: Run[] = [];
	let last = 0;
	for (const match of sentence.matchAll(FIGURE)) {
		if (match.index > last) runs.push({ text: sentence.slice(last, match.index), figure: false });
		runs.push({ text: match[0], figure: true });
		last = match.index + match[0].length;
	}
	if (last < sentence.length) runs.push({ text: sentence.slice(last), figure: false });
	return runs;
}
