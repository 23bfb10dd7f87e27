import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { manyTrees } from './manyTrees.ts';
import { cpuTime, pairedRatio, type Row } from './row.ts';

export async function parsing(): Promise<Row> {
	const { newick, json } = manyTrees();
	const ours = () => cpuTime(() => readTrees(newick));
	const theirs = () => cpuTime(() => JSON.parse(json));
	return {
		work: 'reading 1,000 trees of 100 tips',
		against: 'JSON.parse of the same trees as nested arrays',
		measured: `${(await pairedRatio(ours, theirs, 9)).toFixed(1)} × as fast`,
		wanted: '1 ×'
	};
}
