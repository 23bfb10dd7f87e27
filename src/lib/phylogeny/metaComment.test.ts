import { describe, expect, it } from 'vitest';
import { numberPair, parseMetaComment } from './metaComment.ts';

describe('parseMetaComment', () => {
	it('splits on commas outside braces and quotes', () => {
		expect(parseMetaComment('height_95%_HPD={1.5,2},!color="a,b",rate=0.2,flag')).toEqual([
			['height_95%_HPD', '{1.5,2}'],
			['!color', 'a,b'],
			['rate', '0.2'],
			['flag', '']
		]);
	});

	it('keeps the double-ampersand dialect whole and unread', () => {
		expect(parseMetaComment('&XXX:a=1:b=2,3')).toEqual([['&', 'XXX:a=1:b=2,3']]);
	});

	it('gives nothing for an empty comment', () => expect(parseMetaComment(' ')).toEqual([]));
});

describe('numberPair', () => {
	it('reads a list of two numbers', () => expect(numberPair('{1.5, 2e1}')).toEqual([1.5, 20]));

	it.each(['1.5', '{1}', '{1,2,3}', '{a,2}', '{1,}', '{}'])('is undefined for %s', (value) =>
		expect(numberPair(value)).toBeUndefined()
	);
});
