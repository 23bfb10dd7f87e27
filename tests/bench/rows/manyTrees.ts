type Nested = { name?: string; length: number; children?: Nested[] };

/** Small fixed generator (a linear congruence): the bench needs the same trees each time, not good randomness. */
export function generator(seed: number): () => number {
	let state = seed;
	return () => {
		state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
		return state / 2 ** 32;
	};
}

/** Random joining of tips with names of 20 characters and lengths of 8 decimals. */
export function randomNested(tipCount: number, random: () => number): Nested {
	let live: Nested[] = Array.from({ length: tipCount }, (_, i) => ({
		name: `Genus_epithetum_${String(i).padStart(4, '0')}`,
		length: Number(random().toFixed(8))
	}));
	while (live.length > 1) {
		const one = live.splice(Math.floor(random() * live.length), 1);
		const other = live.splice(Math.floor(random() * live.length), 1);
		live = [...live, { length: Number(random().toFixed(8)), children: [...one, ...other] }];
	}
	return live[0] ?? { length: 0 };
}

export function newickOf({ name, length, children }: Nested): string {
	return `${children === undefined ? name : `(${children.map(newickOf).join(',')})`}:${length}`;
}

function arraysOf({ name, length, children }: Nested): unknown[] {
	return children === undefined ? [name, length] : [...children.map(arraysOf), length];
}

/** 1,000 trees of 100 tips, as Newick and as nested arrays. */
export function manyTrees(random = generator(20261)): { readonly newick: string; readonly json: string } {
	const nested = Array.from({ length: 1_000 }, () => randomNested(100, random));
	return { newick: nested.map((tree) => `${newickOf(tree)};`).join('\n'), json: JSON.stringify(nested.map(arraysOf)) };
}
