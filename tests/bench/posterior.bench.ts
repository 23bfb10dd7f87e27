import { bench, describe } from 'vitest';
import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { drawnOverlap, drawnTree } from '#lib/statistics/exampleTrees.ts';
import { averagedTest } from '#lib/statistics/posterior/averagedTest.ts';
import { gatherTrees } from '#lib/statistics/posterior/gatherTrees.ts';
import { randomStream } from '#lib/statistics/randomStream.ts';

/*
 * Read the ratio of the group, not its times: the test over all trees, their ages and 9,999 shuffles free and within the
 * deepest split, is to take less than three times as long as reading the trees.
 */
const TREES = 1000;
const TIPS = 100;
const SHUFFLES = 9999;

const stream = randomStream(20261, 0, 8);
const text = Array.from({ length: TREES }, drawnNewick).join('\n');
const overlap = drawnOverlap(TIPS, stream, 6);

/** A drawn tree as text, its tips in one order: names of 20 characters, lengths of 8 decimals. */
function drawnNewick(): string {
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

function testOver({ trees }: ReturnType<typeof readTrees>): void {
	const rows = Int32Array.from({ length: TIPS }, (_, row) => row);
	const posterior = trees.map(({ tree }) => ({ parent: tree.parent, ages: nodeAges(tree), rows }));
	const [displayed] = posterior;
	if (displayed === undefined) throw new Error('The text holds trees.');
	const asked = { overlap, tipCount: TIPS };
	const gathered = gatherTrees({ ...asked, trees: posterior, displayed, statistics: ['slope'], nameOf: String });
	averagedTest({ ...asked, gathered, permutations: SHUFFLES, seed: 1 });
}

describe(`${TREES} trees of ${TIPS} tips, ${SHUFFLES} shuffles`, () => {
	const read = readTrees(text);
	bench('reading the trees', () => {
		readTrees(text);
	});
	bench('ages, lines and the test over all of them', () => {
		testOver(read);
	});
});
