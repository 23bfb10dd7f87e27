import type { Remark } from '#lib/remarks/remark.ts';
import { remark } from '#lib/remarks/remark.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { matchNames } from './names/matchNames.ts';

export type Dropped = { readonly name: string; readonly in: 'tree' | 'data'; readonly why: string };

export type SharedSpecies = {
	/** tip and species that stand for one another, in tree order */
	readonly pairs: readonly { readonly tip: string; readonly species: string }[];
	readonly dropped: readonly Dropped[];
	readonly remarks: readonly Remark[];
};

type Question = {
	readonly tips: readonly string[];
	readonly species: readonly string[];
	readonly decisions: readonly { readonly from: string; readonly to: string | null; readonly why?: string }[];
	readonly asked: 'shared' | readonly string[];
};

/**
 * The species that tree and data share under the decisions in force, or those of them that a plan names.
 * Every other name is listed with the reason; nothing is left out in silence.
 * @throws {InputError} `unknown-species` when a plan names a species that is not shared
 */
export function sharedSpecies({ tips, species, decisions, asked }: Question): SharedSpecies {
	const matching = matchNames({ tips: [...tips], species: [...species], decisions: [...decisions] });
	const order = new Map(tips.map((tip, index) => [tip, index]));
	const all = [...matching.pairs].sort((a, b) => (order.get(a.tip) ?? 0) - (order.get(b.tip) ?? 0));
	if (asked === 'shared') return withRemarks(all, matching.dropped);

	const wanted = new Set(asked);
	const pairs = all.filter(({ tip, species: name }) => wanted.has(tip) || wanted.has(name));
	const found = new Set(pairs.flatMap(({ tip, species: name }) => [tip, name]));
	const unknown = asked.filter((name) => !found.has(name));
	if (unknown.length > 0) {
		throw new InputError(
			'unknown-species',
			`The plan names species that tree and matrix do not share: ${unknown.slice(0, 5).join(', ')}${unknown.length > 5 ? `, and ${unknown.length - 5} more` : ''}.`
		);
	}
	const kept = new Set(pairs.map(({ tip }) => tip));
	const leftOut = all
		.filter(({ tip }) => !kept.has(tip))
		.map(({ tip }): Dropped => ({ name: tip, in: 'tree', why: 'not named in the plan' }));
	return withRemarks(pairs, [...matching.dropped, ...leftOut]);
}

function withRemarks(pairs: SharedSpecies['pairs'], dropped: readonly Dropped[]): SharedSpecies {
	if (dropped.length === 0) return { pairs, dropped, remarks: [] };
	const named = dropped.slice(0, 6).map(({ name }) => name);
	const more = dropped.length > named.length ? `, and ${dropped.length - named.length} more` : '';
	const message = `${dropped.length} name${dropped.length === 1 ? ' is' : 's are'} not used: ${named.join(', ')}${more}. Each is listed with the reason.`;
	return { pairs, dropped, remarks: [remark('look', 'dropped-species', message)] };
}
