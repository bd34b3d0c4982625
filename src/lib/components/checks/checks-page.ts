import { SUSPECT_KEYS, type SuspectKey } from '$lib/model/suspect';
import { CHECK_KINDS, type Change, type Check, type CheckKind } from '$lib/model/wire/field';
import { counted } from '$lib/utils/format';

/** The finding over the sheet of checks and changes. */
export function checksTitle(checks: readonly Check[], changes: readonly Change[], tag: string): string {
	const outside = checks.filter((check) => check.result === 'outside' && !check.indicative);
	const last = outside.at(-1);
	const changedSince = last && changes.some((change) => change.at > last.at);
	if (last && !changedSince) return last.verdict.replace(/\.$/, '');
	if (checks.length + changes.length === 0) return `No check on ${tag} yet`;
	const unsigned = checks.filter((check) => check.signedAt === null && check.kind !== 'note').length;
	const all = `${counted(checks.length, 'check')} and ${counted(changes.length, 'change')} on ${tag}`;
	return unsigned > 0 ? `${all}, ${unsigned} not signed yet` : all;
}

/** The form an address asks for: `?record=sensor`, `?record=change`. */
export function openFormOf(url: URL): CheckKind | 'change' | null {
	const asked = url.searchParams.get('record');
	if (asked === 'change') return 'change';
	return CHECK_KINDS.find((kind) => kind === asked) ?? null;
}

/** The suspect that a check is to settle: `?suspect=low-oil`. */
export function suspectOf(url: URL): SuspectKey | null {
	const asked = url.searchParams.get('suspect');
	return SUSPECT_KEYS.find((key) => key === asked) ?? null;
}
