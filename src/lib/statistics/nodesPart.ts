import type { KernelPart, ValueColumn } from './arrangementValues.ts';
import type { Functional, FunctionalInput } from './functionals.ts';
import type { KernelRegions } from './kernelRegions.ts';
import { nodeSumsParts, nodeSumsTask } from './nodeSums.ts';

/**
 * Functionals by way of the sums of every node: the overlaps as they are, in the order of the plain loop, so the values
 * are those of the plain loop to the last bit.
 */
export function nodesPart(input: FunctionalInput, functionals: readonly Functional[], capacity: number): KernelPart {
	const slots = input.layout.pairs.length;
	const plain = functionals.filter(({ source }) => source === 'plain');
	const nested = functionals.filter(({ source }) => source === 'nested');
	const evaluate = (regions: KernelRegions<string>, count: number): ValueColumn[] => {
		const { address } = regions;
		regions.run('nodeSums', nodeSumsTask(input, count, address));
		return [
			...columnsOf(plain, { sums: 'plain', weights: 'plainForms', values: 'plainValues' }),
			...columnsOf(nested, { sums: 'nested', weights: 'nestedForms', values: 'nestedValues' })
		];

		function columnsOf(forms: readonly Functional[], names: { sums: string; weights: string; values: string }): ValueColumn[] {
			// The fields of WeightedSumsTask in src/kernel.
			const task = [address(names.sums), count, slots, address(names.weights), forms.length, address(names.values)];
			regions.run('weightedSums', task);
			const values = regions.doubles(names.values, count * forms.length);
			return forms.map((functional, from) => ({ functional, slack: 0, values, from, step: forms.length }));
		}
	};
	return {
		parts: {
			...nodeSumsParts(input, capacity),
			plainForms: Float64Array.from(plain.flatMap(({ weights }) => [...weights])),
			nestedForms: Float64Array.from(nested.flatMap(({ weights }) => [...weights])),
			plainValues: 8 * capacity * plain.length,
			nestedValues: 8 * capacity * nested.length
		},
		evaluate
	};
}
