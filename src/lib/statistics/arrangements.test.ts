import { describe, expect, it } from 'vitest';
import {
	arrangementCount,
	identityArrangement,
	lnArrangementCount,
	nextArrangementInPlace,
	shuffleInPlace
} from './arrangements.ts';
import { randomStream } from './randomStream.ts';

describe('shuffleInPlace', () => {
	// By property: 24,000 shuffles of 4 give each of the 24 orders 1,000 times, standard deviation 31.
	it('makes every order equally likely', () => {
		const stream = randomStream(11, 0);
		const arrangement = identityArrangement(4);
		const counts = new Map<string, number>();
		for (let i = 0; i < 24_000; i++) {
			shuffleInPlace(arrangement, stream, { from: 0, to: 4 });
			const order = arrangement.join('');
			counts.set(order, (counts.get(order) ?? 0) + 1);
		}
		expect(counts.size).toBe(24);
		expect([...counts.values()].every((count) => Math.abs(count - 1000) < 155)).toBe(true);
	});

	it('leaves what stands outside the group', () => {
		const arrangement = identityArrangement(9);
		shuffleInPlace(arrangement, randomStream(1, 0), { from: 2, to: 6 });
		expect([...arrangement.slice(0, 2), ...arrangement.slice(6)]).toEqual([0, 1, 6, 7, 8]);
		expect([...arrangement].sort()).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8]);
	});
});

describe('nextArrangementInPlace', () => {
	const visit = (length: number, groups: { from: number; to: number }[]) => {
		const arrangement = identityArrangement(length);
		const seen = [arrangement.join('')];
		while (nextArrangementInPlace(arrangement, groups)) seen.push(arrangement.join(''));
		return { seen, last: arrangement.join('') };
	};

	// By hand.
	it('visits the six orders of three, the identity first, and comes back to it', () => {
		expect(visit(3, [{ from: 0, to: 3 }])).toEqual({ seen: ['012', '021', '102', '120', '201', '210'], last: '012' });
	});

	// By hand: 3! · 2! = 12, each group staying in its places.
	it('visits every product of the orders of two groups once', () => {
		const groups = [
			{ from: 0, to: 3 },
			{ from: 4, to: 6 }
		];
		const { seen } = visit(6, groups);
		expect(new Set(seen).size).toBe(12);
		expect(seen.length).toBe(12);
		expect(seen.every((order) => order[3] === '3')).toBe(true);
		expect(arrangementCount(groups)).toBe(12);
		expect(lnArrangementCount(groups)).toBeCloseTo(Math.log(12), 14);
	});

	it('has the identity alone where no group has two members', () => {
		expect(visit(2, []).seen).toEqual(['01']);
		expect(arrangementCount([])).toBe(1);
	});
});
