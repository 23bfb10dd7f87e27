/** The state of one stream: the words a, b, c and the counter of sfc32. Drawing changes it. */
export type RandomStream = { readonly words: Int32Array };

/**
 * What a stream is for, so that two questions asked with one seed never share their numbers. Every statistic of the free
 * question reads the same shuffles, which is what lets a minimum p compare them. Shuffles inside one clade take
 * `insideClade` plus the clade's node.
 */
export const STREAM_DOMAIN = {
	free: 0,
	within: 1,
	power: 2,
	fallBootstrap: 3,
	fallShape: 4,
	signal: 5,
	insideClade: 0x1_0000
} as const;

/** Rounds thrown away after seeding, as the generator's author does for three seed words. */
const WARM_UP_ROUNDS = 15;

/**
 * A stream of uniform 32-bit numbers by Doty-Humphrey's sfc32 ("small fast counting"). The three seed words are the
 * domain, the seed and the chunk, so different triples always start in different states; the counter guarantees a
 * period of at least 2^32 in each. Only 32-bit integer operations: any machine draws the same bits.
 *
 * @param seed - whole number in [0, 2^32)
 * @param chunk - whole number in [0, 2^32)
 * @param domain - see `STREAM_DOMAIN`
 * @see Doty-Humphrey, PractRand, https://pracrand.sourceforge.net/RNG_engines.txt
 */
export function randomStream(seed: number, chunk: number, domain = 0): RandomStream {
	for (const word of [seed, chunk, domain]) {
		if (!Number.isInteger(word) || word < 0 || word > 0xffff_ffff) {
			throw new Error(`A stream is seeded by whole numbers from 0 to 2^32 - 1; got ${word}.`);
		}
	}
	const stream = { words: Int32Array.of(domain, seed, chunk, 1) };
	for (let round = 0; round < WARM_UP_ROUNDS; round++) nextUint32(stream);
	return stream;
}

/** @returns the next number of the stream, uniform on [0, 2^32) */
export function nextUint32({ words }: RandomStream): number {
	const b = words[1] ?? 0;
	const c = words[2] ?? 0;
	const counter = words[3] ?? 0;
	const drawn = ((words[0] ?? 0) + b + counter) | 0;
	words[0] = b ^ (b >>> 9);
	words[1] = (c + (c << 3)) | 0;
	words[2] = (((c << 21) | (c >>> 11)) + drawn) | 0;
	words[3] = (counter + 1) | 0;
	return drawn >>> 0;
}

const TWO_TO_32 = 4_294_967_296;

/** A number uniform on the open interval (0, 1): the middles of 2^32 equal steps. */
export function nextUniform(stream: RandomStream): number {
	return (nextUint32(stream) + 0.5) / TWO_TO_32;
}

/**
 * A standard normal number: the first of the pair that the polar method makes, the second thrown away so that a stream
 * holds no hidden state.
 *
 * @see Marsaglia & Bray (1964), doi:10.1137/1006063
 */
export function nextNormal(stream: RandomStream): number {
	for (;;) {
		const x = 2 * nextUniform(stream) - 1;
		const y = 2 * nextUniform(stream) - 1;
		const square = x * x + y * y;
		if (square > 0 && square < 1) return x * Math.sqrt((-2 * Math.log(square)) / square);
	}
}

/**
 * A uniform whole number below `bound`, without bias: the high word of the product, redrawn in the few cases whose low
 * word would favour some results. The product stays exact in a double because bounds here are far below 2^21.
 *
 * @param bound - whole number in [1, 2^21]
 * @see Lemire (2019), doi:10.1145/3230636, algorithm 5
 */
export function nextBelow(stream: RandomStream, bound: number): number {
	let drawn = nextUint32(stream);
	let low = Math.imul(drawn, bound) >>> 0;
	if (low < bound) {
		const unfair = TWO_TO_32 % bound;
		while (low < unfair) {
			drawn = nextUint32(stream);
			low = Math.imul(drawn, bound) >>> 0;
		}
	}
	return Math.floor((drawn * bound) / TWO_TO_32);
}
