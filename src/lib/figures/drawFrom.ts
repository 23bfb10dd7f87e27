/** Numbers in [0, 1) from a 32-bit counter hashed twice: small, and good enough to look at. The test has its own stream. */
export function drawFrom(seed: number, step: number): () => number {
	let state = (Math.imul(seed ^ 0x9e3779b9, 0x85ebca6b) + Math.imul(step + 1, 0xc2b2ae35)) >>> 0;
	return () => {
		state = (state + 0x6d2b79f5) >>> 0;
		let mixed = Math.imul(state ^ (state >>> 15), state | 1);
		mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
		return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
	};
}
