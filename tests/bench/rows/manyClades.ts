import { treeShape } from '#lib/statistics/agedTree.ts';
import { testClades } from '#lib/statistics/clades/testClades.ts';
import { mantelCase } from './mantelCase.ts';
import { cpuTime, type Row, SHUFFLES } from './row.ts';

const LARGE = 1_000;
const CLADES = 200;

/** Seconds, not a ratio: the bound is what a person waits for. The largest clades, each with its test beyond its parent. */
export function manyClades(): Row {
	const { tree, overlap } = mantelCase(LARGE);
	const { internal, tipFrom, tipTo } = treeShape(tree);
	const sizeOf = (node: number) => (tipTo[node] ?? 0) - (tipFrom[node] ?? 0);
	const groups = [...internal]
		.filter((node) => node > 0)
		.sort((a, b) => sizeOf(b) - sizeOf(a))
		.slice(0, CLADES)
		.map((node) => ({ node, members: Int32Array.from({ length: sizeOf(node) }, (_, k) => (tipFrom[node] ?? 0) + k) }));
	const time = cpuTime(() => testClades({ tree, overlap, groups, seed: 1, permutations: SHUFFLES, alpha: 0.05 }));
	return {
		work: `${LARGE} species, ${SHUFFLES} shuffles, ${CLADES} clades, one thread`,
		against: 'the clock of the processor',
		measured: `${(time / 1000).toFixed(1)} s`,
		wanted: 'under 10 s'
	};
}
