import { prunedTo, tipNames } from './clade.ts';
import { newickText, underscored } from './treeText.ts';
import { csvText } from './tableText.ts';
import type { Study } from './study.ts';

export type ExampleFile = { readonly path: string; readonly text: string };

const SPECIES_COUNT = 8;
const OVERLAP_DECIMALS = 3;
const BYTE_ORDER_MARK = '\uFEFF';
const MISSPELT = 3; // position of the species whose name lost a letter on its way into the pair list

/** Small files as they come from a colleague's spreadsheet: nothing in them is wrong, nothing is tidy. */
export function messyFiles(study: Study): ExampleFile[] {
	const chosen = spacedSpecies(study);
	return [
		{ path: 'messy/half-matrix.csv', text: halfMatrix(study, chosen) },
		{ path: 'messy/pair-list.csv', text: pairList(study, chosen) },
		{ path: 'messy/tree.nwk', text: wrappedTree(study, chosen) }
	];
}

/** Species spaced evenly along the tree, in the order of the tree. */
function spacedSpecies(study: Study): string[] {
	const names = tipNames(study.tree);
	return names.filter(
		(_, index) => Math.floor((index * SPECIES_COUNT) / names.length) !== Math.floor(((index - 1) * SPECIES_COUNT) / names.length)
	);
}

/** Lower half with its diagonal, semicolons, decimal commas, line ends and mark of a spreadsheet. */
function halfMatrix(study: Study, chosen: readonly string[]): string {
	const rows = chosen.map((name, row) => {
		const cells = chosen.map((other, column) => (column <= row ? overlapOf(study, name, other).replace('.', ',') : ''));
		return [name, ...cells].join(';');
	});
	return `${BYTE_ORDER_MARK}${[['', ...chosen].join(';'), ...rows].join('\r\n')}\r\n`;
}

/** Every pair once, in no helpful order, names underscored and one misspelt. */
function pairList(study: Study, chosen: readonly string[]): string {
	const spelling = (name: string): string =>
		underscored(chosen.indexOf(name) === MISSPELT ? `${name.slice(0, -2)}${name.slice(-1)}` : name);
	const rows = chosen.flatMap((name, index) =>
		chosen.slice(index + 1).map((other, step) => {
			const pair = step % 2 === 0 ? [spelling(name), spelling(other)] : [spelling(other), spelling(name)];
			return [...pair, overlapOf(study, name, other)];
		})
	);
	return csvText([['species_a', 'species_b', 'overlap'], ...rows]);
}

/** The same species and one more that has no overlap, over several lines, with a comment and a quoted name. */
function wrappedTree(study: Study, chosen: readonly string[]): string {
	const extra = tipNames(study.tree).find((name) => !chosen.includes(name));
	const tips = new Set(extra === undefined ? chosen : [...chosen, extra]);
	const pruned = prunedTo(study.tree, tips);
	if (pruned === undefined) throw new Error('The small tree has no tips.');
	const label = (name: string): string => (name === chosen[0] ? `'${name}'` : underscored(name));
	return `[ages in Ma; pruned by hand]\n${newickText(pruned, 3, label).replaceAll(',(', ',\n  (')}\n`;
}

function overlapOf(study: Study, a: string, b: string): string {
	const value = study.overlaps.d[study.species.indexOf(a)]?.[study.species.indexOf(b)];
	if (value === undefined) throw new Error(`No overlap of ${a} and ${b}.`);
	return value.toFixed(OVERLAP_DECIMALS);
}
