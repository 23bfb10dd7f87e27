import { describe, expect, it } from 'vitest';
import { nextBelow, nextUint32, randomStream } from './randomStream.ts';

const draw = (stream: ReturnType<typeof randomStream>, count: number) => Array.from({ length: count }, () => nextUint32(stream));

describe('randomStream', () => {
	// From outside: the author's generator (PractRand pre0.95, `RNG_output sfc32 64 <seed>`), as printed in the tests of
	// the Rust crate sfc-prng: seed words (0, 0, 0) and (0, 0x89ABCDEF, 0x01234567), after its 15 rounds.
	it('draws the published sequence of sfc32 seeded by zeros', () => {
		expect(draw(randomStream(0, 0, 0), 4)).toEqual([0xfb52c520, 0x38802be1, 0x948279e6, 0xec4bf1d9]);
	});

	it('draws the published sequence of sfc32 seeded by three words', () => {
		const expected = [0x35e05b54, 0x4c627ca1, 0x33a043e2, 0xb6113c67, 0x7cab9699, 0x4a52efeb, 0x5936797f, 0x139e2b9f];
		expect(draw(randomStream(0x89abcdef, 0x01234567, 0), 8)).toEqual(expected);
	});

	it('differs when the seed, the chunk or the domain differs', () => {
		const firsts = [randomStream(1, 2, 0), randomStream(2, 1, 0), randomStream(1, 2, 1), randomStream(1, 3, 0)].map((s) =>
			nextUint32(s)
		);
		expect(new Set(firsts).size).toBe(4);
	});

	it('refuses a seed that is no unsigned 32-bit number', () => {
		expect(() => randomStream(-1, 0)).toThrow('whole numbers from 0 to 2^32 - 1; got -1.');
		expect(() => randomStream(0, 0.5)).toThrow('got 0.5.');
	});
});

describe('nextBelow', () => {
	// By property: 60,000 draws below 6 have 10,000 of each, standard deviation 91; 5 of them is a p of 6e-7 per face.
	it('draws every number below the bound equally often', () => {
		const stream = randomStream(7, 0);
		const counts = new Array<number>(6).fill(0);
		for (let i = 0; i < 60_000; i++) {
			const drawn = nextBelow(stream, 6);
			counts[drawn] = (counts[drawn] ?? 0) + 1;
		}
		expect(counts.every((count) => Math.abs(count - 10_000) < 456)).toBe(true);
	});

	// By hand: bound 3 leaves 2^32 mod 3 = 1 unfair low word, 0. State (0, 0, 0, 0) draws 0, whose low word is 0, so it is
	// drawn again; the state is then (0, 0, 0, 1), which draws 1: floor(3 / 2^32) = 0, from the second draw.
	it('draws again where the low word would favour a number', () => {
		const stream = { words: Int32Array.of(0, 0, 0, 0) };
		expect(nextBelow(stream, 3)).toBe(0);
		expect(stream.words[3]).toBe(2);
	});

	it('takes nothing but 0 below 1', () => {
		expect(nextBelow(randomStream(3, 3), 1)).toBe(0);
	});
});
