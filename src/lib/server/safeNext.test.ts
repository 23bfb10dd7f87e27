import { describe, expect, it } from 'vitest';
import { safeNext } from './safeNext.ts';

describe('safeNext', () => {
	it('keeps an address of this site with its query', () => {
		expect(safeNext('/studies/a/names?x=1', 'https://lab.example')).toBe('/studies/a/names?x=1');
	});

	it.each(['//evil.example/a', '/\\evil.example', 'https://evil.example', 'javascript:alert(1)', '/\t/evil.example', '', null])(
		'leads to the studies instead of %j',
		(next) => expect(safeNext(next, 'https://lab.example')).toBe('/studies')
	);
});
