import { assertFinite } from '#lib/remarks/assertFinite.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { crownNode, nodeDepths, PRESENT_TOLERANCE } from './nodeAges.ts';
import { type Tree, tipIndices } from './tree.ts';

/** Largest relative spread that is rounding of the text: six printed digits give 1e-6 to 1e-5. Dimensionless. */
export const ROUNDING_SPREAD = 1e-3;

/** Largest relative spread a person may confirm away; beyond it tips are fossils or lengths are not times. Dimensionless. */
export const CONFIRMABLE_SPREAD = 1e-2;

/** How far the tips of a tree are from ending together, and which two differ most. */
export type TipSpread = { readonly spread: number; readonly shallowest: string; readonly deepest: string };

/**
 * Relative spread of the root-to-tip distances, (max - min) / max, measured from the first node that branches.
 *
 * @param tree - lengths finite and >= 0
 * @returns in [0, 1]; dimensionless; 0 when every distance is 0
 * @throws {InputError} as `nodeDepths`
 */
export function ultrametricSpread(tree: Tree): number {
	return tipSpread(tree).spread;
}

/** As `ultrametricSpread`, with the labels of the tips that end first and last. */
export function tipSpread(tree: Tree): TipSpread {
	const depths = nodeDepths(tree);
	const tips = tipIndices(tree);
	let shallowest = tips[0] ?? 0;
	let deepest = shallowest;
	for (const tip of tips) {
		if ((depths[tip] ?? 0) < (depths[shallowest] ?? 0)) shallowest = tip;
		if ((depths[tip] ?? 0) > (depths[deepest] ?? 0)) deepest = tip;
	}
	const most = (depths[deepest] ?? 0) - (depths[crownNode(tree)] ?? 0);
	const range = (depths[deepest] ?? 0) - (depths[shallowest] ?? 0);
	return { spread: most > 0 ? range / most : 0, shallowest: tree.label[shallowest] ?? '', deepest: tree.label[deepest] ?? '' };
}

/**
 * What a spread means for the test, in four bands: `ultrametric` (for information), `spread-rounding` (for information:
 * accepted and shown), `spread-needs-decision` (a person confirms that the tips all live now), `not-ultrametric` (cannot be
 * confirmed away).
 *
 * @param spread - as `ultrametricSpread`; dimensionless
 * @param ends - the tips to name, and the index of the tree among several
 * @throws {InputError} `non-finite` when `spread` is no number
 */
export function ultrametricRemark(spread: number, ends: { shallowest?: string; deepest?: string; tree?: number } = {}): Remark {
	assertFinite(spread, 'the spread of root-to-tip distances');
	const { shallowest = '', deepest = '', tree } = ends;
	const named = shallowest === '' ? {} : { name: shallowest, otherName: deepest };
	const where = { ...named, ...(tree === undefined ? {} : { tree }) };
	const between = shallowest === '' ? '' : ` ("${shallowest}" ends first, "${deepest}" last)`;
	const found = `Root-to-tip distances differ by ${percent(spread)} of the longest${between}`;
	if (spread <= PRESENT_TOLERANCE) return remark('information', 'ultrametric', 'All tips end at the same time.', where);
	if (spread <= ROUNDING_SPREAD)
		return remark('information', 'spread-rounding', `${found}: taken as rounding of the text.`, where);
	if (spread <= CONFIRMABLE_SPREAD) {
		const ask = 'Confirm that all species live now, and the tips will be extended to the same time; or bring the exact tree.';
		return remark('settle', 'spread-needs-decision', `${found}. ${ask}`, where);
	}
	const advice = 'Fossil tips, or lengths that are not times; the test needs a dated tree of living species.';
	return remark('settle', 'not-ultrametric', `${found}. ${advice}`, where);
}

/**
 * The tree with every terminal branch extended so that all tips end as late as the latest one. Inner branches, and so the
 * order and spacing of the splits, stay as they are; every node age is measured from the latest tip, as before. This is the
 * repair for a spread that a person has confirmed, never applied unasked.
 *
 * @param tree - lengths finite and >= 0
 * @throws {InputError} as `nodeDepths`
 */
export function levelTips(tree: Tree): Tree {
	const depths = nodeDepths(tree);
	const tips = tipIndices(tree);
	const latest = tips.reduce((most, tip) => Math.max(most, depths[tip] ?? 0), 0);
	const length = tree.length.slice();
	for (const tip of tips) if (tip > 0 && depths[tip] !== latest) length[tip] = latest - (depths[tree.parent[tip] ?? 0] ?? 0);
	return { ...tree, length };
}

function percent(share: number): string {
	return `${Number((share * 100).toPrecision(2))} %`;
}
