import type { NameMatching, NameRow } from '#lib/analysis/names/matchNames.ts';
import type { Access } from '#lib/server/access.ts';
import * as names from '#lib/server/repositories/names.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import type { TreeSet } from '#lib/server/repositories/treeSetRows.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { drawTreeSet } from '../materials/drawTree.server.ts';
import { openNames } from './openNames.ts';
import { nameThreads } from './threads.ts';
import { speciesUse, usedWords } from './usedWords.ts';

/** More lines than this cannot be followed by eye; the lists stand without threads. */
const THREADS_UP_TO = 600;

/** Tips against species: what needs a person, what is settled and why, and the threads between the two lists. */
export async function namesPage(access: Access, { tree, run }: { tree: string | null; run: string | null }) {
	const [trees, runs] = [await treeSets.list(access), await overlapRuns.list(access)];
	const choices = { trees: trees.map(choice), runs: runs.map(choice) };
	const treeSet = trees.find(({ id }) => id === tree) ?? trees[0];
	const overlapRun = runs.find(({ id }) => id === run) ?? runs[0];
	if (treeSet === undefined || overlapRun === undefined) return { ...choices, compared: null };
	const matching = await names.matching(access, { treeSet: treeSet.id, overlapRun: overlapRun.id });
	if (matching === null) return { ...choices, compared: null };
	const decided = new Map((await names.current(access)).map((decision) => [decision.from, decision]));
	const isVisitor = access.role === 'visitor';
	return {
		...choices,
		compared: {
			...{ tree: treeSet.id, run: overlapRun.id, sentence: matching.sentence, counts: matching.counts },
			open: openNames(matching.rows),
			settled: matching.rows
				.filter(({ settled }) => settled)
				.map((row) => settledLine(row, isVisitor ? undefined : decided.get(row.species ?? row.tip ?? ''))),
			...{ tips: treeSet.tips, species: overlapRun.species, used: usedWords(speciesUse(matching)) },
			figure: treeSet.tips.length > THREADS_UP_TO ? null : await figureOf(treeSet, overlapRun.species, matching)
		}
	};
}

const choice = ({ id, label }: { id: string; label: string }) => ({ id, label });

async function figureOf(treeSet: TreeSet, species: readonly string[], { rows }: NameMatching) {
	return { ...nameThreads({ tips: treeSet.tips, species }, rows), drawing: await drawTreeSet(treeSet) };
}

function settledLine({ species, tip, kind, reason, decision }: NameRow, held: names.CurrentDecision | undefined) {
	return {
		...{ species: species ?? null, tip: tip ?? null, kind, reason, isDecided: decision !== undefined },
		why: decision?.why ?? '',
		by: held?.decidedBy ?? null,
		at: held?.decidedAt ?? null
	};
}
