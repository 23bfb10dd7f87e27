import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import { readText } from '#lib/overlap/readText.ts';
import { isMendable } from './isMendable.ts';

function codeOf(bytes: Uint8Array): string {
	try {
		readText(bytes);
		return 'read';
	} catch (thrown) {
		if (thrown instanceof InputError) return thrown.code;
		throw thrown;
	}
}

describe('isMendable', () => {
	// A workbook is a zip archive, which begins with PK and the bytes 3 and 4; the code comes from the reader itself.
	it('offers no field for a workbook', () => {
		const workbook = Uint8Array.of(0x50, 0x4b, 3, 4, ...new TextEncoder().encode('xl/worksheets/sheet1.xml'));
		expect(codeOf(workbook)).toBe('spreadsheet-file');
		expect(isMendable({ code: codeOf(workbook) })).toBe(false);
	});

	it('offers one for a text with a fault', () => {
		expect(isMendable({ code: 'unbalanced-brackets' })).toBe(true);
	});
});
