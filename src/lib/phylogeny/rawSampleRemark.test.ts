import { describe, expect, it } from 'vitest';
import { rawSampleRemark } from './rawSampleRemark.ts';

const steps = (count: number, from: number, spelling = (step: number) => `STATE ${step}`) =>
	Array.from({ length: count }, (_, i) => spelling(from + i * 1000));

describe('rawSampleRemark', () => {
	it('asks for the burn-in of trees written from step 0 on', () => {
		expect(rawSampleRemark(steps(1001, 0))).toEqual({
			level: 'look',
			code: 'burn-in',
			message:
				'The 1,001 trees are called “STATE 0” to “STATE 1000000”, as a sampler writes them from its first step on. ' +
				'All are used. Say how many to leave out at the start (burn-in), or 0 when none.'
		});
		expect(rawSampleRemark(steps(20, 0, (step) => `gen.${step}`))?.code).toBe('burn-in');
	});

	it('takes a first step above 0 for a burn-in left out already', () => {
		expect(rawSampleRemark(steps(1000, 100_000))).toBeNull();
	});

	it('says nothing of few trees, or of trees called otherwise', () => {
		expect(rawSampleRemark(steps(19, 0))).toBeNull();
		expect(rawSampleRemark([...steps(30, 0), 'consensus'])).toBeNull();
		expect(rawSampleRemark(new Array<string>(30).fill(''))).toBeNull();
	});
});
