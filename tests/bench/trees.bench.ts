import { bench, describe } from 'vitest';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import type { Tree } from '#lib/phylogeny/tree.ts';
import { generator, manyTrees, newickOf, randomNested } from './rows/manyTrees.ts';

const { newick, json } = manyTrees();
const megabytes = (text: string) => (text.length / 1e6).toFixed(2);

describe('1,000 trees of 100 tips: the ratio is the figure', () => {
	bench(`readTrees, ${megabytes(newick)} MB of Newick`, () => {
		readTrees(newick);
	});
	bench(`JSON.parse, ${megabytes(json)} MB of the same as nested arrays`, () => {
		JSON.parse(json);
	});
});

const large: Tree | undefined = readTrees(`${newickOf(randomNested(2_000, generator(20262)))};`).trees[0]?.tree;

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
