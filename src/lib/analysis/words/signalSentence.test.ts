import { describe, expect, it } from 'vitest';
import type { SignalBlock } from '#lib/contracts/resultBlocks.ts';
import { beyondRandomWalk, companionCautions, signalSentence } from './signalSentence.ts';

type Variable = SignalBlock['variables'][number];

function variable(name: string, k: Partial<Variable['k']>, role: Variable['role'] = 'position'): Variable {
	const test = { value: 0.8, p: 0.01, exact: false, count: 9999, pAdjusted: 0.01, pAboveRandomWalk: 0.6, ...k };
	return {
		variable: name,
		role,
		species: 26,
		leftOut: [],
		k: test,
		lambda: null,
		models: [],
		measurementError: false,
		notes: []
	};
}
const block = (...variables: Variable[]): SignalBlock => ({ table: 'Positions', variables });

describe('signalSentence', () => {
	it('says signal, and no more than a random walk, when K is no larger than one gives', () => {
		expect(signalSentence(block(variable('temperature', {})), 0.05)).toBe(
			'Relatives stand near one another in temperature (K = 0.80, p = 0.010), no nearer than a random walk would leave them.'
		);
	});

	it('says nearer than a random walk only with K above 1 and a small p against random walks', () => {
		const strong = { value: 1.6, pAboveRandomWalk: 0.02 };
		expect(signalSentence(block(variable('temperature', strong)), 0.05)).toContain('nearer than a random walk would leave them.');
		expect(beyondRandomWalk(block(variable('temperature', strong)), 0.05)).toEqual(['temperature']);
		expect(beyondRandomWalk(block(variable('temperature', { ...strong, value: 0.9 })), 0.05)).toEqual([]);
		expect(beyondRandomWalk(block(variable('temperature', { ...strong, pAdjusted: 0.2 })), 0.05)).toEqual([]);
		// Two positions, two chances: .02 is not enough for both.
		expect(
			beyondRandomWalk(block(variable('temperature', { ...strong, pAboveRandomWalk: 0.03 }), variable('rain', {})), 0.05)
		).toEqual([]);
	});

	it('says that no signal was detected, and that p is adjusted when there are several', () => {
		const sentence = signalSentence(block(variable('temperature', {}), variable('rain', { value: 0.3, pAdjusted: 0.4 })), 0.05);
		expect(sentence).toContain('In rain no signal was detected (K = 0.30, p = 0.40, adjusted).');
	});
});

describe('companionCautions', () => {
	it('warns of breadth, records or range size that go with the tree, and not otherwise', () => {
		const codes = (p: number) =>
			companionCautions(block(variable('sd', { p }, 'breadth'), variable('n', { p: 0.5 }, 'records')), 0.05).map(
				({ code }) => code
			);
		expect(codes(0.01)).toEqual(['signal-in-breadth']);
		expect(codes(0.2)).toEqual([]);
	});
});
