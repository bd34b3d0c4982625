/** Mean advance of a letter in ems: the words' sans at 600, the figures' mono (JetBrains Mono is 0.6 em by design). */
const WORDS = 0.54;
const FIGURES = 0.6;

let ink: CanvasRenderingContext2D | null | undefined;
const known = new Map<string, number>();

function context(): CanvasRenderingContext2D | null {
	if (ink !== undefined) return ink;
	ink = typeof document === 'undefined' ? null : document.createElement('canvas').getContext('2d');
	return ink;
}

/**
 * Width of a printed label, px: measured where there is a canvas, else estimated from the mean advance.
 * @param size px
 */
export function textWidth(text: string, size = 12, face: 'words' | 'figures' = 'words', weight = 600): number {
	const canvas = context();
	if (canvas === null) return text.length * size * (face === 'words' ? WORDS : FIGURES);
	const family = face === 'words' ? "'Hanken Grotesk', system-ui, sans-serif" : "'JetBrains Mono', monospace";
	const font = `${weight} ${size}px ${family}`;
	const key = `${font}|${text}`;
	const before = known.get(key);
	if (before !== undefined) return before;
	canvas.font = font;
	const width = canvas.measureText(text).width;
	if (known.size > 2000) known.clear();
	known.set(key, width);
	return width;
}

/** Forgets measured widths: the fonts have arrived. */
export function forgetWidths(): void {
	known.clear();
}
