import { getContext, setContext } from 'svelte';
import type { UnitSystem } from '$lib/model/quantities';

export type Paper = 'day' | 'night' | 'system';
export type PreferenceValues = { units: UnitSystem; paper: Paper };

/** Sends a changed preference to where it is kept. */
export type SavePreferences = (changed: Partial<PreferenceValues>) => Promise<void>;

/** Keeps a person's choice in their account: PATCH /api/me. @throws Error when the answer is a refusal */
export async function savePreferences(changed: Partial<PreferenceValues>): Promise<void> {
	const answer = await fetch('/api/me', {
		method: 'PATCH',
		headers: { 'content-type': 'application/json' },
		body: JSON.stringify(changed)
	});
	if (!answer.ok) throw new Error(`preferences were not kept: ${answer.status}`);
}

/**
 * Units of measure and paper of the person who looks. A choice shows at once and is kept in the background; when it
 * cannot be kept it still holds for this page, and `unsaved` says so.
 */
export class Preferences {
	units = $state<UnitSystem>('si');
	paper = $state<Paper>('system');
	unsaved = $state(false);
	readonly #save: SavePreferences;

	constructor(initial: PreferenceValues, save: SavePreferences = savePreferences) {
		this.units = initial.units;
		this.paper = initial.paper;
		this.#save = save;
	}

	choose(changed: Partial<PreferenceValues>): void {
		if (changed.units) this.units = changed.units;
		if (changed.paper) this.paper = changed.paper;
		this.#save(changed).then(
			() => (this.unsaved = false),
			() => (this.unsaved = true)
		);
	}
}

const KEY = Symbol('preferences');

/** Called once by the layout of the signed-in pages. */
export function setPreferences(preferences: Preferences): Preferences {
	return setContext(KEY, preferences);
}

/** The preferences of the page. @throws Error outside the signed-in pages */
export function getPreferences(): Preferences {
	const found = getContext<Preferences | undefined>(KEY);
	if (!found) throw new Error('preferences are known on signed-in pages only');
	return found;
}
