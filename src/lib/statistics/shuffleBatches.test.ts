import { describe, expect, it } from 'vitest';
import { identityArrangement, shuffleInPlace } from './arrangements.ts';
import { nextNormal, randomStream, STREAM_DOMAIN } from './randomStream.ts';
import { plannedArrangements, shuffleBatches, type ShuffleQuestion } from './shuffleBatches.ts';

const six: ShuffleQuestion = { tipCount: 6, groups: [{ from: 0, to: 6 }], domain: STREAM_DOMAIN.free, seed: 7, permutations: 99 };
const twelve: ShuffleQuestion = { ...six, tipCount: 12, groups: [{ from: 0, to: 12 }], permutations: 600 };

function rowsOf(question: ShuffleQuestion, share?: { firstChunk: number; chunkCount: number }): string[] {
	const rows: string[] = [];
	for (const { count, arrangements } of shuffleBatches(question, share)) {
		for (let row = 0; row < count; row++) {
			rows.push(arrangements.slice(row * question.tipCount, (row + 1) * question.tipCount).join(' '));
		}
	}
	return rows;
}

describe('shuffleBatches', () => {
	it('enumerates every order of a few species once, the observed one first', () => {
		const rows = rowsOf(six);
		expect(plannedArrangements(six)).toEqual({ exact: true, count: 720 }); // 6!
		expect(rows[0]).toBe('0 1 2 3 4 5');
		expect(new Set(rows).size).toBe(720);
	});

	it('draws the same shuffles as the streams of the chunks, whoever asks for which part', () => {
		const whole = rowsOf(twelve);
		const parts = [0, 1, 2].flatMap((firstChunk) => rowsOf(twelve, { firstChunk, chunkCount: 1 }));
		expect(whole).toHaveLength(600);
		expect(parts).toEqual(whole); // property: chunks are independent
		const arrangement = identityArrangement(12);
		shuffleInPlace(arrangement, randomStream(7, 1, STREAM_DOMAIN.free), { from: 0, to: 12 });
		expect(whole[256]).toBe(arrangement.join(' ')); // by definition: chunk 1 starts at shuffle 256
	});

	it('moves species inside the groups only', () => {
		const inside = rowsOf({ ...twelve, groups: [{ from: 2, to: 11 }], permutations: 300 });
		expect(inside.every((row) => row.startsWith('0 1 ') && row.endsWith(' 11'))).toBe(true);
	});
});

describe('nextNormal', () => {
	it('has mean 0, variance 1 and the kurtosis of a normal law', () => {
		const stream = randomStream(3, 0);
		const drawn = Float64Array.from({ length: 40_000 }, () => nextNormal(stream));
		const moment = (k: number) => drawn.reduce((sum, x) => sum + x ** k, 0) / drawn.length;
		// Standard normal: E x = 0, E x^2 = 1, E x^4 = 3; margins are four standard errors (1, 2, 96 over n).
		expect(Math.abs(moment(1))).toBeLessThan(4 * Math.sqrt(1 / 40_000));
		expect(Math.abs(moment(2) - 1)).toBeLessThan(4 * Math.sqrt(2 / 40_000));
		expect(Math.abs(moment(4) - 3)).toBeLessThan(4 * Math.sqrt(96 / 40_000));
	});
});
