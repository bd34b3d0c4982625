/** The clock of browser tests: a winter Tuesday, so that neither zone is near a change of clocks. */
export const FIXED_NOW = '2026-02-17T18:00:00Z';
/** The demo's password (README.md). */
export const PASSWORD = 'cold-start-0600';

export const origin = (): string => process.env.FIRSTPULL_ORIGIN ?? '';
/** Where the product keeps its data, and the mail it has sent as files. */
export const dataFolder = (): string => process.env.FIRSTPULL_DATA ?? '';
