import { describe, expect, it } from 'vitest';
import { answersForm } from './materialForms.ts';

describe('answersForm', () => {
	// By hand: a tenth of the trees is the share 0.1; without a sign it is a number of trees.
	it('reads the burn-in as a number of trees or as a share', () => {
		const burnIn = (text: string) => answersForm.parse({ burnIn: text }).burnIn;
		expect(['250', '0', '10 %', '2.5%', '0 %'].map(burnIn)).toEqual([250, 0, 0.1, 0.025, 0]);
		expect(burnIn('')).toBeUndefined();
	});

	it.each(['-3', '100 %', 'ten', '0.5'])('refuses a burn-in of %s, and says what is expected', (text) => {
		expect(answersForm.safeParse({ burnIn: text }).error?.issues[0]?.message).toBe(
			'Give the trees to leave out at the start: a number from 0, or a share such as 10 %.'
		);
	});
});
