import { describe, expect, it } from 'vitest';
import { identityArrangement } from './arrangements.ts';
import { denseSumsOfBatch } from './denseSums.ts';
import { symmetricMatrix } from './pairValues.ts';

describe('denseSumsOfBatch', () => {
	// The worked example: z = 43/5 as it stands, 48/5 with the species A, B, D, C at the tips.
	it("gives Mantel's z of the worked example and of a relabelling", () => {
		const cells = symmetricMatrix([0.8, 0.7, 0.6, 0.4, 0.4, 0.5], 4, 1);
		const weights = symmetricMatrix([1, 2, 2, 4, 4, 4], 4, 0);
		const arrangements = Int32Array.of(...identityArrangement(4), 0, 1, 3, 2);
		const sums = denseSumsOfBatch({ cells, weights, tipCount: 4 }, { count: 2, arrangements });
		expect(sums[0]).toBeCloseTo(43 / 5, 12);
		expect(sums[1]).toBeCloseTo(48 / 5, 12);
	});
});
