const BROWSERS: readonly (readonly [RegExp, string])[] = [
	[/\bEdgA?\//, 'Edge'],
	[/\b(OPR|Opera)\//, 'Opera'],
	[/\bFirefox\/|\bFxiOS\//, 'Firefox'],
	[/\bHeadlessChrome\/|\bChrome\/|\bCriOS\/|\bChromium\//, 'Chromium or Chrome'],
	[/\bSafari\//, 'Safari']
];
const MACHINES: readonly (readonly [RegExp, string])[] = [
	[/\bAndroid\b/, 'Android'],
	[/\b(iPhone|iPad|iPod)\b/, 'iPhone or iPad'],
	[/\bWindows\b/, 'Windows'],
	[/\bMac OS X\b/, 'a Mac'],
	[/\b(Linux|X11|CrOS)\b/, 'Linux']
];

/**
 * A browser's own name and machine in a few words, from the `User-Agent` it sends; for a person to tell sessions apart,
 * nothing is decided by it. Null or an empty text is a program.
 */
export function browserName(userAgent: string | null): string {
	if (!userAgent) return 'A program';
	const browser = BROWSERS.find(([pattern]) => pattern.test(userAgent))?.[1];
	const machine = MACHINES.find(([pattern]) => pattern.test(userAgent))?.[1];
	if (!browser) return userAgent.slice(0, 60);
	return machine ? `${browser} on ${machine}` : browser;
}
