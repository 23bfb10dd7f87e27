import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { drawnOverlap, drawnTree } from '#lib/statistics/exampleTrees.ts';
import { averagedTest } from '#lib/statistics/posterior/averagedTest.ts';
import { gatherTrees } from '#lib/statistics/posterior/gatherTrees.ts';
import { type RandomStream, randomStream } from '#lib/statistics/randomStream.ts';
import { cpuTime, pairedRatio, type Row, SHUFFLES } from './row.ts';

const TREES = 1000;
const TIPS = 100;

/** A drawn tree as text, its tips in one order: names of 20 characters, lengths of 8 decimals. */
function drawnNewick(stream: RandomStream): string {
	const { parent, ages } = drawnTree(TIPS, stream);
	const inner = new Set(parent);
	const parts: string[] = Array.from(parent, () => '');
	let tip = TIPS;
	for (let node = parent.length - 1; node >= 0; node--) {
		const label = inner.has(node) ? `(${parts[node] ?? ''})` : `Lychnorana_of_row${String(--tip).padStart(3, '0')}`;
		const above = parent[node] ?? -1;
		if (above < 0) return `${label};`;
		const own = `${label}:${((ages[above] ?? 0) - (ages[node] ?? 0)).toFixed(8)}`;
		parts[above] = parts[above] === '' ? own : `${own},${parts[above] ?? ''}`;
	}
	return ';';
}

function testOver({ trees }: ReturnType<typeof readTrees>, overlap: Float64Array): void {
	const rows = Int32Array.from({ length: TIPS }, (_, row) => row);
	const posterior = trees.map(({ tree }) => ({ parent: tree.parent, ages: nodeAges(tree), rows }));
	const [displayed] = posterior;
	if (displayed === undefined) throw new Error('The text holds trees.');
	const asked = { overlap, tipCount: TIPS };
	const gathered = gatherTrees({ ...asked, trees: posterior, displayed, statistics: ['slope'], nameOf: String });
	averagedTest({ ...asked, gathered, permutations: SHUFFLES, seed: 1 });
}

/** The test over all trees, their ages and the shuffles free and within the deepest split, beside reading the trees. */
export async function posterior(): Promise<Row> {
	const stream = randomStream(20261, 0, 8);
	const text = Array.from({ length: TREES }, () => drawnNewick(stream)).join('\n');
	const overlap = drawnOverlap(TIPS, stream, 6);
	const read = readTrees(text);
	const reading = () => cpuTime(() => readTrees(text));
	const testing = () => cpuTime(() => testOver(read, overlap));
	return {
		work: `the test over ${TREES} trees of ${TIPS} tips, ${SHUFFLES} shuffles freely and within the deepest split`,
		against: 'reading the trees',
		measured: `${(await pairedRatio(reading, testing, 9)).toFixed(1)} × its time`,
		wanted: 'under 3 ×'
	};
}
