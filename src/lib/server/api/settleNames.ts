import { tidyName } from '#lib/analysis/names/tidyName.ts';
import type { Access } from '#lib/server/access.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { Refusal } from './refusal.ts';

type Decision = { readonly from: string; readonly to: string | null; readonly why?: string | undefined };

/**
 * Decisions with every name as the materials show it: a script may send a tip label as its file spells it, with
 * underscores. Before there is a tree, or a matrix, its names cannot be compared and are kept as they are.
 * @throws {Refusal} 422 `decided-twice`, `unknown-tip`, `unknown-species`, each naming all it found
 */
export async function settleNames(access: Access, decisions: readonly Decision[]): Promise<Decision[]> {
	refuseTwice(decisions);
	const tips = shownNames((await treeSets.list(access)).flatMap((set) => set.tips));
	const species = shownNames((await overlapRuns.list(access)).flatMap((run) => run.species));
	const settled = decisions.map(({ from, to, why }) => ({
		// A tip of the tree can be left out as well.
		from: shown(species, from) ?? (to === null ? shown(tips, from) : undefined),
		to: to === null ? null : shown(tips, to),
		...(why === undefined ? {} : { why })
	}));
	refuseUnknown('unknown-tip', decisions, (index) => settled[index]?.to === undefined);
	refuseUnknown('unknown-species', decisions, (index) => settled[index]?.from === undefined);
	return settled.map(({ from = '', to = null, ...rest }) => ({ from, to, ...rest }));
}

type Shown = ReadonlyMap<string, string>;

/** Names of all materials by themselves and by their tidied form; exact spelling goes first. */
function shownNames(names: readonly string[]): Shown {
	const tidied = names.map((name): [string, string] => [tidyName(name).key, name]);
	return new Map([...tidied, ...names.map((name): [string, string] => [name, name])]);
}

function shown(names: Shown, name: string): string | undefined {
	return names.size === 0 ? name : (names.get(name) ?? names.get(tidyName(name).key));
}

function refuseTwice(decisions: readonly Decision[]): void {
	const seen = new Set<string>();
	const twice = decisions.filter(({ from }) => seen.size === seen.add(from).size).map(({ from }) => from);
	if (twice.length === 0) return;
	throw new Refusal(
		422,
		'decided-twice',
		`Expected one decision for each name; more than one for ${[...new Set(twice)].join(', ')}.`
	);
}

const EXPECTED = {
	'unknown-tip': 'Expected every `to` to be a tip label of a tree of this study, or null; these are none',
	'unknown-species': 'Expected every `from` to be a name in the data of this study; these are none'
} as const;

function refuseUnknown(code: keyof typeof EXPECTED, decisions: readonly Decision[], isUnknown: (index: number) => boolean): void {
	const unknown = decisions.filter((_, index) => isUnknown(index)).map(({ from, to }) => (code === 'unknown-tip' ? to : from));
	if (unknown.length > 0) throw new Refusal(422, code, `${EXPECTED[code]}: ${unknown.join(', ')}.`);
}
