/** What was typed into a form and not sent, kept in the browser so that a reload or a timeout loses nothing. */

const key = (name: string): string => `firstpull draft ${name}`;

/** The draft of a form, or the fallback when there is none or the browser keeps nothing. */
export function readDraft<T extends object>(name: string, fallback: T): T {
	try {
		const text = localStorage.getItem(key(name));
		return text ? { ...fallback, ...(JSON.parse(text) as Partial<T>) } : fallback;
	} catch {
		return fallback;
	}
}

export function keepDraft(name: string, draft: object): void {
	try {
		localStorage.setItem(key(name), JSON.stringify(draft));
	} catch {
		// A private window keeps nothing; the form itself still holds what was typed.
	}
}

export function dropDraft(name: string): void {
	try {
		localStorage.removeItem(key(name));
	} catch {
		// Nothing was kept.
	}
}
