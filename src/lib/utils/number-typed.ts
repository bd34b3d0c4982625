/** A number as it was typed, comma or point; null for nothing, NaN for what is none. */
export function numberTyped(text: string): number | null {
	const plain = text.trim().replace('−', '-').replace(',', '.');
	if (plain === '') return null;
	return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : Number.NaN;
}
