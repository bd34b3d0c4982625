/** The UTC day of an instant, `2025-03-05`. */
export function dayOf(ms: number): string {
	return new Date(ms).toISOString().slice(0, 10);
}
