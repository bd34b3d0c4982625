/** The kinds of messages the product sends, and which of them a person may choose. */

export const MAIL_KINDS = {
	'repeat-trip': { words: 'At once, when a start-up trip repeats', choice: true },
	'case-reopened': { words: 'When a case comes back by itself', choice: true },
	digest: { words: 'Weekly: new repeaters, cases that wait, proofs reached', choice: true },
	'late-log': { words: 'When a log that is delivered by itself is late', choice: true },
	brief: { words: 'Brief of a visit', choice: false },
	report: { words: 'Report of a visit', choice: false },
	invitation: { words: 'Invitation', choice: false },
	reset: { words: 'New password', choice: false },
	'email-change': { words: 'New address', choice: false },
	security: { words: 'Something about the account’s safety', choice: false }
} as const;
export type MailKind = keyof typeof MAIL_KINDS;
export const MAIL_CHOICES = (Object.keys(MAIL_KINDS) as MailKind[]).filter((kind) => MAIL_KINDS[kind].choice);
