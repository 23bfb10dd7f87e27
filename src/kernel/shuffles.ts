/** What `shuffles` reads. Fields stand in memory in this order, four bytes each; the caller writes them so. */
@unmanaged
export class ShuffleTask {
	/** out: shape (count, tips) of i32, one arrangement after the other */
	arrangements: usize;
	count: i32;
	tipCount: i32;
	/** shape (groups, 2) of i32: neighbouring positions whose species change places, half-open */
	groups: usize;
	groupCount: i32;
	domain: u32;
	seed: u32;
	chunk: u32;
}

const WARM_UP_ROUNDS: i32 = 15;

/**
 * The shuffles of one chunk, bit for bit those of `randomStream.ts` and `shuffleInPlace`: sfc32 seeded by domain, seed
 * and chunk; each shuffle begins from the order the last one left, the first from the identity. The state is kept in
 * locals, which is why the generator stands in the loop.
 */
export function shuffles(task: ShuffleTask): void {
	const rowBytes: usize = (<usize>task.tipCount) << 2;
	let a: u32 = task.domain;
	let b: u32 = task.seed;
	let c: u32 = task.chunk;
	let counter: u32 = 1;
	for (let round = 0; round < WARM_UP_ROUNDS; round++) {
		const thrown = a + b + counter++;
		a = b ^ (b >> 9);
		b = c + (c << 3);
		c = rotl(c, 21) + thrown;
	}
	for (let made = 0; made < task.count; made++) {
		const row = task.arrangements + <usize>made * rowBytes;
		if (made > 0) memory.copy(row, row - rowBytes, rowBytes);
		else for (let tip = 0; tip < task.tipCount; tip++) store<i32>(row + ((<usize>tip) << 2), tip);
		for (let g = 0; g < task.groupCount; g++) {
			const from = load<i32>(task.groups + ((<usize>g) << 3));
			const to = load<i32>(task.groups + ((<usize>g) << 3), 4);
			const first = row + ((<usize>from) << 2);
			for (let bound: u32 = to - from; bound > 1; bound--) {
				let product: u64;
				do {
					const drawn = a + b + counter++;
					a = b ^ (b >> 9);
					b = c + (c << 3);
					c = rotl(c, 21) + drawn;
					product = <u64>drawn * <u64>bound;
					// Redrawn where the low word would favour some results (Lemire 2019); the remainder is computed only then.
				} while (<u32>product < bound && <u32>product < <u32>(((<u64>1) << 32) % <u64>bound));
				const last = first + ((<usize>(bound - 1)) << 2);
				const chosen = first + ((<usize>(product >> 32)) << 2);
				const moved = load<i32>(last);
				store<i32>(last, load<i32>(chosen));
				store<i32>(chosen, moved);
			}
		}
	}
}
