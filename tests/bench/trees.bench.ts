import { bench, describe } from 'vitest';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import type { Tree } from '#lib/phylogeny/tree.ts';

type Nested = { name?: string; length: number; children?: Nested[] };

/** Small fixed generator (a linear congruence): the bench needs the same trees each time, not good randomness. */
function generator(seed: number): () => number {
	let state = seed;
	return () => {
		state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
		return state / 2 ** 32;
	};
}

/** Random joining of tips with names of 20 characters and lengths of 8 decimals. */
function randomNested(tipCount: number, random: () => number): Nested {
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

function newickOf({ name, length, children }: Nested): string {
	return `${children === undefined ? name : `(${children.map(newickOf).join(',')})`}:${length}`;
}

function arraysOf({ name, length, children }: Nested): unknown[] {
	return children === undefined ? [name, length] : [...children.map(arraysOf), length];
}

const random = generator(20261);
const nested = Array.from({ length: 1_000 }, () => randomNested(100, random));
const newick = nested.map((tree) => `${newickOf(tree)};`).join('\n');
const json = JSON.stringify(nested.map(arraysOf));
const megabytes = (text: string) => (text.length / 1e6).toFixed(2);

describe('1,000 trees of 100 tips: the ratio is the figure', () => {
	bench(`readTrees, ${megabytes(newick)} MB of Newick`, () => {
		readTrees(newick);
	});
	bench(`JSON.parse, ${megabytes(json)} MB of the same as nested arrays`, () => {
		JSON.parse(json);
	});
});

const large: Tree | undefined = readTrees(`${newickOf(randomNested(2_000, random))};`).trees[0]?.tree;

describe('one tree of 2,000 tips', () => {
	if (large === undefined) throw new Error('the text holds a tree');
	const ages = nodeAges(large);
	bench('nodeAges', () => {
		nodeAges(large);
	});
	bench('mrcaAges, 4 million cells', () => {
		mrcaAges(large, ages);
	});
	bench('a plain fill of as many cells', () => {
		new Float64Array(4_000_000).fill(1);
	});
});
