import type { Refrigerant } from './unit';

/** Safety classes by ANSI/ASHRAE Standard 34: toxicity A or B, flammability 1, 2L, 2 or 3. From memory; the label rules. */
export const SAFETY_CLASSES: Readonly<Record<Refrigerant, 'A1' | 'A2L' | 'B1'>> = {
	'R-134a': 'A1',
	'R-1234ze(E)': 'A2L',
	'R-1234yf': 'A2L',
	'R-513A': 'A1',
	'R-514A': 'B1',
	'R-123': 'B1',
	'R-22': 'A1',
	'R-410A': 'A1',
	'R-407C': 'A1'
};

/** What the class asks of who goes there: one sentence. */
export function safetyWords(refrigerant: Refrigerant): string {
	const safety = SAFETY_CLASSES[refrigerant];
	const also = {
		A1: '',
		A2L: ' mildly flammable, keep ignition sources away;',
		B1: ' toxic at low concentration;'
	}[safety];
	return `Refrigerant ${refrigerant}, safety class ${safety} (ASHRAE 34):${also} it displaces oxygen. Detector and ventilation before entering the machinery room; certified people only, with recovery.`;
}
