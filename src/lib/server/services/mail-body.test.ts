import { describe, expect, it } from 'vitest';
import { mailHtml, mailText } from './mail-body';

const body = {
	title: 'A < B & "C"',
	paragraphs: ['One.', '- first\n- second'],
	facts: [['Unit', 'U 1']] as const,
	cautions: ['Prove flow.'],
	link: { words: 'Open', href: 'https://firstpull.test/?a=1&b=2' },
	because: 'Because.'
};

describe('mail bodies', () => {
	it('say the same in both parts, and escape what a person typed', () => {
		const html = mailHtml(body);
		expect(html).toContain('A &lt; B &amp; &quot;C&quot;');
		expect(html).not.toMatch(/<img|<script|http-equiv/);
		expect(html).toContain('<li>first</li>');
		for (const words of ['One.', 'Prove flow.', 'Because.', 'U 1']) {
			expect(html).toContain(words);
			expect(mailText(body)).toContain(words);
		}
		expect(mailText(body)).toContain('Open: https://firstpull.test/?a=1&b=2');
	});
});
