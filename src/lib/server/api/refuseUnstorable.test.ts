import { describe, expect, it } from 'vitest';
import { isStorable, refuseUnstorable } from './refuseUnstorable.ts';

describe('isStorable', () => {
	it('takes every whole character but NUL', () => {
		expect(isStorable('Lychnorana fluviális 🐸')).toBe(true);
		expect(isStorable('a\0b')).toBe(false);
		expect(isStorable('\ud83d')).toBe(false);
	});
});

describe('refuseUnstorable', () => {
	it('finds the text wherever it is, also in a key', () => {
		for (const value of ['\0', ['a', ['\0']], { a: { b: ['\ud800'] } }, { 'a\0': 1 }]) {
			expect(() => refuseUnstorable(value)).toThrow('Expected text without NUL characters');
		}
	});

	it('takes numbers, null and plain text', () => {
		expect(() => refuseUnstorable({ a: [1, null, true, 'text'] })).not.toThrow();
	});

	it('does not overflow on deep nesting', () => {
		let deep: unknown = 'end';
		for (let i = 0; i < 200_000; i++) deep = [deep];
		expect(() => refuseUnstorable(deep)).not.toThrow();
	});
});
