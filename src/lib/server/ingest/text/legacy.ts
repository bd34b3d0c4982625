/**
 * Single- and double-byte encodings of older loggers, told apart only where the bytes leave no doubt. Everything else is
 * Windows-1252, in which a trend export's degree and cube signs come out right.
 */

/** The degree sign of DOS code pages 437 and 850. */
export const DOS_DEGREE = 0xf8;

const isHigh = (byte: number): boolean => byte >= 0x80;

/** Every byte above ASCII is a degree sign of DOS before C, F or K: no other reading makes sense in a table. */
function isDos(bytes: Uint8Array): boolean {
	let seen = 0;
	for (let i = 0; i < bytes.length; i++) {
		if (!isHigh(bytes[i] ?? 0)) continue;
		const next = bytes[i + 1];
		if (bytes[i] !== DOS_DEGREE || (next !== 0x43 && next !== 0x46 && next !== 0x4b)) return false;
		seen++;
	}
	return seen > 0;
}

/** Words of four Cyrillic letters or more hold most of what is above ASCII, and the rest is °, № and ё. */
function isCyrillic(bytes: Uint8Array): boolean {
	let high = 0;
	let inWords = 0;
	let strange = 0;
	let run = 0;
	for (const byte of bytes) {
		if (byte >= 0xc0) run++;
		else {
			if (run >= 4) inWords += run;
			run = 0;
			if (isHigh(byte) && ![0xb0, 0xb9, 0xb8, 0xa8].includes(byte)) strange++;
		}
		if (isHigh(byte)) high++;
	}
	if (run >= 4) inWords += run;
	return inWords >= 8 && inWords >= 0.7 * high && strange <= 0.03 * high;
}

/** Two-byte characters that decode without a fault, most of them kana or Chinese characters, some of them kana. */
function isShiftJis(bytes: Uint8Array): boolean {
	let text: string;
	try {
		text = new TextDecoder('shift_jis', { fatal: true }).decode(bytes, { stream: true });
	} catch {
		return false;
	}
	const high = [...text].filter((c) => c.charCodeAt(0) >= 0x80);
	const full = high.filter((c) => /[\u3040-\u30ff\u4e00-\u9fff\u2103\u3000-\u303f\uff01-\uff5e]/.test(c));
	const kana = high.filter((c) => /[\u3040-\u30ff]/.test(c));
	return kana.length >= 2 && full.length >= 0.95 * high.length;
}

/** The encoding of a text that is neither UTF-8 nor UTF-16. */
export function legacyEncoding(bytes: Uint8Array): 'windows-1252' | 'windows-1251' | 'shift_jis' | 'ibm850' {
	if (isDos(bytes)) return 'ibm850';
	if (isShiftJis(bytes)) return 'shift_jis';
	return isCyrillic(bytes) ? 'windows-1251' : 'windows-1252';
}
