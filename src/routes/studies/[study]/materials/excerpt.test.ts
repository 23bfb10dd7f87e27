import { describe, expect, it } from 'vitest';
import { excerpt } from './excerpt.ts';

// Expected stretches by hand: lines and columns count from 1.
describe('excerpt', () => {
	it('marks the sign a column of a tree points to, two lines on each side', () => {
		const lines = excerpt('one\ntwo\n(a:1,b:-3);\nfour\nfive\nsix', { line: 3, column: 8 }, 'signs');
		expect(lines.map(({ number }) => number)).toEqual([1, 2, 3, 4, 5]);
		expect(lines[2]).toEqual({ number: 3, before: '(a:1,b:', marked: '-', after: '3);', isAtFault: true });
	});

	it('shows the whole text when its first sign is at fault', () => {
		expect(excerpt('((a,b);', { line: 1, column: 1 }, 'signs')).toEqual([
			{ number: 1, before: '', marked: '(', after: '(a,b);', isAtFault: true }
		]);
	});

	it('marks the cell a column of a table points to, whatever stands in quotes', () => {
		const [line] = excerpt('"Parus, major",0.5,oops,1', { line: 1, column: 3 }, 'cells');
		expect(line).toMatchObject({ before: '"Parus, major",0.5,', marked: 'oops', after: ',1' });
	});

	it('cuts a line of a million signs to what fits', () => {
		const text = `${'a'.repeat(500_000)}!${'b'.repeat(500_000)}`;
		const [line] = excerpt(text, { line: 1, column: 500_001 }, 'signs');
		expect(line?.marked).toBe('!');
		expect(line?.before).toBe(`…${'a'.repeat(60)}`);
		expect(line?.after).toBe(`${'b'.repeat(60)}…`);
	});

	it('counts lines that end in CR LF or CR as one each', () => {
		const lines = excerpt('a\r\nb\rc', { line: 2 }, 'signs');
		expect(lines.map(({ before, after }) => before + after)).toEqual(['a', 'b', 'c']);
	});

	it('shows nothing when an error points nowhere', () => {
		expect(excerpt('a,b', undefined, 'cells')).toEqual([]);
		expect(excerpt('a,b', { name: 'a' }, 'cells')).toEqual([]);
	});

	it('shows the end of a text that is too short', () => {
		expect(excerpt('(a', { line: 1, column: 9 }, 'signs')).toEqual([
			{ number: 1, before: '(a', marked: '', after: '', isAtFault: true }
		]);
	});
});
