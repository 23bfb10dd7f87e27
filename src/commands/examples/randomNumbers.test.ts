import { describe, expect, it } from 'vitest';
import { randomNumbers, shuffled } from './randomNumbers.ts';

const DRAWS = 20_000;

function momentsOf(draw: () => number): { mean: number; variance: number } {
	const values = Array.from({ length: DRAWS }, draw);
	const mean = values.reduce((sum, value) => sum + value, 0) / DRAWS;
	return { mean, variance: values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (DRAWS - 1) };
}

describe('randomNumbers', () => {
	it('repeats itself for one seed and topic, and differs for another seed or topic', () => {
		const firstOf = (seed: number, topic: string): number => randomNumbers(seed, topic).uniform();
		expect(firstOf(7, 'tree')).toBe(firstOf(7, 'tree'));
		expect(new Set([firstOf(7, 'tree'), firstOf(8, 'tree'), firstOf(7, 'niches')]).size).toBe(3);
	});

	// Moments of the three distributions from any textbook; 4 standard errors of a mean or variance of 20,000 draws allowed.
	it('draws uniform, normal and exponential numbers with the right mean and variance', () => {
		const { uniform, normal, exponential } = randomNumbers(11, 'moments');
		const flat = momentsOf(uniform);
		expect(Math.abs(flat.mean - 1 / 2)).toBeLessThan(4 * Math.sqrt(1 / 12 / DRAWS));
		expect(Math.abs(flat.variance - 1 / 12)).toBeLessThan(4 * Math.sqrt(1 / 180 / DRAWS));
		const bell = momentsOf(normal);
		expect(Math.abs(bell.mean)).toBeLessThan(4 * Math.sqrt(1 / DRAWS));
		expect(Math.abs(bell.variance - 1)).toBeLessThan(4 * Math.sqrt(2 / DRAWS));
		const waits = momentsOf(exponential);
		expect(Math.abs(waits.mean - 1)).toBeLessThan(4 * Math.sqrt(1 / DRAWS));
		expect(Math.abs(waits.variance - 1)).toBeLessThan(4 * Math.sqrt(8 / DRAWS));
	});

	it('stays within [0, 1)', () => {
		const { uniform } = randomNumbers(3, 'range');
		const values = Array.from({ length: DRAWS }, uniform);
		expect(Math.min(...values)).toBeGreaterThanOrEqual(0);
		expect(Math.max(...values)).toBeLessThan(1);
	});
});

describe('shuffled', () => {
	// By hand: six orders of three letters, 1,000 each expected of 6,000; 4 standard errors are 4 sqrt(6000 × 1/6 × 5/6) = 115.
	it('gives every order equally often', () => {
		const random = randomNumbers(5, 'orders');
		const counts = new Map<string, number>();
		for (let turn = 0; turn < 6000; turn++) {
			const order = shuffled(['a', 'b', 'c'], random).join('');
			counts.set(order, (counts.get(order) ?? 0) + 1);
		}
		expect(counts.size).toBe(6);
		for (const count of counts.values()) expect(Math.abs(count - 1000)).toBeLessThan(115);
	});
});
