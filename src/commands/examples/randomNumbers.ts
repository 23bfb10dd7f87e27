/** A source of random numbers for the examples. The same seed and topic give the same numbers for ever. */
export type RandomNumbers = {
	/** @returns a number in [0, 1) with 53 random bits */
	readonly uniform: () => number;
	/** @returns a standard normal deviate */
	readonly normal: () => number;
	/** @returns a waiting time of mean 1 */
	readonly exponential: () => number;
	/** @returns a whole number from 0 to `count` - 1 */
	readonly index: (count: number) => number;
};

const TWO_TO_27 = 134_217_728;
const TWO_TO_53 = 9_007_199_254_740_992;
const GOLDEN_STEP = 0x9e3779b9; // 2^32 divided by the golden ratio, odd: steps through all 32-bit words

/**
 * The topic keeps the parts of an example apart: one more record drawn does not move the tree.
 * It is folded into the seed by multiplying and adding its letters, then spread over four words.
 */
export function randomNumbers(seed: number, topic: string): RandomNumbers {
	const next = xoshiro128(spread(foldTopic(seed, topic)));
	const uniform = (): number => ((next() >>> 6) * TWO_TO_27 + (next() >>> 5)) / TWO_TO_53;
	return {
		uniform,
		normal: polarNormal(uniform),
		exponential: () => -Math.log(1 - uniform()),
		index: (count) => Math.floor(uniform() * count)
	};
}

/** Fisher–Yates: every order equally likely. */
export function shuffled<Item>(items: readonly Item[], random: RandomNumbers): Item[] {
	const rest = [...items];
	const dealt: Item[] = [];
	while (rest.length > 0) dealt.push(...rest.splice(random.index(rest.length), 1));
	return dealt;
}

function foldTopic(seed: number, topic: string): number {
	let word = seed >>> 0;
	for (const letter of topic) word = (Math.imul(word, 31) + (letter.codePointAt(0) ?? 0)) >>> 0;
	return word;
}

/** Four well-mixed words from one: a counter whose bits are stirred by the 32-bit finaliser of MurmurHash3. */
function spread(start: number): [number, number, number, number] {
	let counter = start;
	const word = (): number => {
		counter = (counter + GOLDEN_STEP) >>> 0;
		let bits = counter;
		bits = Math.imul(bits ^ (bits >>> 16), 0x85ebca6b);
		bits = Math.imul(bits ^ (bits >>> 13), 0xc2b2ae35);
		return (bits ^ (bits >>> 16)) >>> 0;
	};
	return [word(), word(), word(), word()];
}

/** xoshiro128++: 32 bits a step, period 2^128 - 1. @see Blackman & Vigna (2021), doi:10.1145/3460772 */
function xoshiro128([a, b, c, d]: [number, number, number, number]): () => number {
	return () => {
		const result = (rotate((a + d) | 0, 7) + a) >>> 0;
		const carried = b << 9;
		c ^= a;
		d ^= b;
		b ^= c;
		a ^= d;
		c ^= carried;
		d = rotate(d, 11);
		return result;
	};
}

function rotate(word: number, bits: number): number {
	return (word << bits) | (word >>> (32 - bits));
}

/**
 * Box–Muller in its polar form: it needs no sine or cosine, whose last digit differs between machines.
 * @see Marsaglia & Bray (1964), doi:10.1137/1006063
 */
function polarNormal(uniform: () => number): () => number {
	let spare: number | undefined;
	return () => {
		if (spare !== undefined) {
			const kept = spare;
			spare = undefined;
			return kept;
		}
		for (;;) {
			const x = 2 * uniform() - 1;
			const y = 2 * uniform() - 1;
			const square = x * x + y * y;
			if (square >= 1 || square === 0) continue;
			const stretch = Math.sqrt((-2 * Math.log(square)) / square);
			spare = y * stretch;
			return x * stretch;
		}
	};
}
