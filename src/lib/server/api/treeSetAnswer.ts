import type { z } from 'zod';
import type { treeSetAnswerSchema } from '#lib/contracts/answers.ts';
import type { TreeStructure } from '#lib/contracts/compute.ts';
import { NOTHING_KNOWN } from '#lib/contracts/treeAbout.ts';
import type { TreeSet } from '#lib/server/repositories/treeSetRows.ts';
import { Refusal } from './refusal.ts';

/** Longest list of tips for which every node names its members: 2,000 tips in a row of clades are 2 million names. */
const MEMBERS_LIMIT_TIPS = 2000;

type Answer = z.infer<typeof treeSetAnswerSchema>;
type Options = { readonly tree: number; readonly withMembers: boolean };

export function treeSetFacts({ treeCount, tipCount, ultrametricSpread, polytomies, rootAge }: TreeSet) {
	return { treeCount, tipCount, ultrametricSpread, polytomies, rootAge };
}

/** @throws {Refusal} 422 `too-many-tips` when members are asked of a tree above the limit */
export function treeSetAnswer(treeSet: TreeSet, structure: TreeStructure, { tree, withMembers }: Options): Answer {
	const { parent, age, label, tips, tipNames } = structure;
	if (withMembers && tipNames.length > MEMBERS_LIMIT_TIPS) throw tooManyTips(tipNames.length);
	const members = withMembers ? memberLists(structure) : null;
	const nodes = parent.map((above, id) => ({
		id,
		parent: above < 0 ? null : above,
		age: age[id] ?? 0,
		label: label[id] ?? '',
		tips: tips[id] ?? 0,
		...(members === null ? {} : { members: members[id] ?? [] })
	}));
	const { id, label: setLabel, ageUnit, kind, treeCount, ultrametricSpread, polytomies, remarks } = treeSet;
	const about = treeSet.about ?? NOTHING_KNOWN;
	const facts = { id, label: setLabel, ageUnit, kind, treeCount, tree, about };
	return { ...facts, tips: [...tipNames], nodes, rootAge: age[0] ?? 0, ultrametricSpread, polytomies, remarks: [...remarks] };
}

/** Tips below a node follow one another in preorder: each list is a stretch of the names. */
function memberLists({ parent, tips, tipNames }: TreeStructure): string[][] {
	let seen = 0;
	const hasChild = new Set(parent);
	return parent.map((_, node) => {
		const first = seen;
		if (!hasChild.has(node)) seen += 1;
		return tipNames.slice(first, first + (tips[node] ?? 0));
	});
}

function tooManyTips(count: number): Refusal {
	return new Refusal(
		422,
		'too-many-tips',
		`Expected at most 2,000 tips for \`members=1\`; this tree has ${count}. Ask without it: \`nodes\` and \`tips\` tell the same.`
	);
}
