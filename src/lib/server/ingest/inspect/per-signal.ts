import { guessByName } from '../columns/by-name';
import { nameParts } from '../columns/tokens';
import type { Draft } from '../layout/draft';

const STATUS = /status|quality|flag|reliab|valid|state$/i;

function stem(file: string): string {
	return (file.split('/').at(-1) ?? file)
		.replace(/\.(csv|tsv|txt|log|xlsx|zinc|json|gz|dat)$/gi, '')
		.replace(/\.(csv|txt)$/i, '');
}

function knows(name: string): boolean {
	return (guessByName(nameParts(name).words, null)[0]?.sure ?? 0) >= 0.55;
}

/** Words of a title line that names the file's point: `Point: Oil temperature`. */
function titled(draft: Draft): string | null {
	for (const cells of draft.header.titles) {
		const text = cells
			.filter((c) => c.trim() !== '')
			.join(' ')
			.replace(/^[^:]{0,20}:\s*/, '')
			.trim();
		if (text !== '' && knows(text)) return text;
	}
	return null;
}

/**
 * Tables of one value column each are one signal a file: the column is then named by its header where that says
 * something, else by a title line, else by the file. Returns whether the draft is of that kind.
 */
export function namePerSignal(draft: Draft): boolean {
	const { plan, kinds, header } = draft;
	if (plan.kind !== 'wide') return false;
	const others = kinds.filter((k) => k.index !== plan.time.column && k.index !== plan.time.clockColumn && k.filled > 0);
	const values = others.filter((k) => !STATUS.test(k.name));
	const value = values.length === 1 ? values[0] : undefined;
	if (!value || others.length > 3) return false;
	const own = header.names[value.index] ?? '';
	if (!header.named || !knows(own)) header.names[value.index] = titled(draft) ?? stem(plan.file);
	plan.kind = 'per-signal';
	plan.roles.value = value.index;
	plan.roles.status = others.find((k) => STATUS.test(k.name))?.index ?? -1;
	return true;
}
