/**
 * Cautions that go with a check wherever it is printed (product.md, "Cautions"). Laws and standards are named exactly.
 */
export const CAUTIONS = {
	qualified:
		'Only qualified people work on this equipment. The manual of its maker, local codes and licensed practice come first.',
	protections: 'Leave every protection as it is: never bypass, jumper, widen or delay one to keep the machine running.',
	resets:
		'Do not keep resetting the trip: each failing start can damage the compressor. Respect the allowed starts per hour.',
	freeze:
		'Low evaporator temperature or lost flow can burst tubes and put water into the refrigerant. Prove flow before any start; after repeated trips check for water before running.',
	remoteStart:
		'The unit may start without warning: off at the unit and at the plant system before hands go in. Lock out and tag out (29 CFR 1910.147).',
	electrical:
		'Verify absence of voltage and wait out a drive’s direct-current bus. Live measurements only by a qualified person, justified and permitted under the site’s rules (NFPA 70E).',
	electricalStop: 'No restart after an electrical, ground-fault or winding trip until the reason is found.',
	oilStop: 'No restart after an oil-flow trip until the reason is found.',
	refrigerant:
		'Opening the circuit is for certified people, with recovery under the local law (40 CFR 82 Subpart F; Regulation (EU) 2024/573). Know the safety class; detector and ventilation before entering the machinery room (ASHRAE 15, EN 378).',
	trappedLiquid: 'Never close both ends of a line full of liquid.',
	pressureTest: 'Pressure tests with regulated dry nitrogen, never with oxygen or air.',
	hot: 'Hot surfaces and pressurised oil: protective equipment.',
	oilReading:
		'Do not run a machine suspected of low oil to settle a reading: read as found and mark it indicative. The maker’s oil grade only; do not overfill.',
	repeat: 'A deliberate repeat of a failing start: a competent person, one attempt, protections live.'
} as const;
export type CautionKey = keyof typeof CAUTIONS;

/** The sentences of some cautions, after the one that goes with every check. */
export function cautionsFor(...keys: readonly CautionKey[]): string[] {
	return [CAUTIONS.qualified, ...keys.map((key) => CAUTIONS[key])];
}
