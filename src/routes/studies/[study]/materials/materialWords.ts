import { formatAge, formatCount, formatFixed, formatShare } from '#lib/analysis/words/numbers.ts';
import { unitWords } from '#lib/analysis/words/units.ts';
import type { AgeUnit, TreeSetKind } from '#lib/contracts/materials.ts';

/** Below this a spread is the rounding of a written tree; relative. */
const ROUNDING = 1e-6;

export type TreeFigures = {
	readonly tipCount: number;
	readonly rootAge: number | null;
	readonly ageUnit: AgeUnit;
	readonly ultrametricSpread: number | null;
	readonly polytomies: number;
};

/** What is known of a tree, a few words a fact. */
export function treeFactWords({ tipCount, rootAge, ageUnit, ultrametricSpread, polytomies }: TreeFigures): string[] {
	return [
		counted(tipCount, 'tip', 'tips'),
		rootAge === null ? 'branch lengths are missing' : `root ${formatAge(rootAge, rootAge)} ${unitWords(ageUnit).date}`,
		...(ultrametricSpread === null ? [] : [spreadWords(ultrametricSpread)]),
		polytomies === 0 ? 'no unresolved node' : counted(polytomies, 'unresolved node', 'unresolved nodes')
	];
}

function spreadWords(spread: number): string {
	if (spread <= ROUNDING) return 'all tips end together';
	return `tips end within ${spread < 0.001 ? `${(spread * 100).toPrecision(1)} %` : formatShare(spread)} of one another`;
}

export function treeKindWords(kind: TreeSetKind, treeCount: number): string {
	if (kind === 'posterior') return counted(treeCount, 'posterior tree', 'posterior trees');
	return treeCount === 1 ? 'summary tree' : `${formatCount(treeCount)} summary trees`;
}

export type MatrixFigures = {
	readonly species: number;
	readonly pairs: number;
	readonly missing: number;
	readonly min: number;
	readonly max: number;
	readonly mean: number;
};

/** What is known of a matrix, a few words a fact. `pairs` are those with a value. */
export function matrixFactWords({ species, pairs, missing, min, max, mean }: MatrixFigures): string[] {
	return [
		`${formatCount(species)} species`,
		missing === 0
			? counted(pairs, 'pair', 'pairs')
			: `${formatCount(pairs)} of ${formatCount(pairs + missing)} pairs, ${formatCount(missing)} missing`,
		...(pairs === 0 ? [] : [`overlap ${formatFixed(min, 2)} to ${formatFixed(max, 2)}, mean ${formatFixed(mean, 2)}`])
	];
}

export function counted(count: number, one: string, many: string): string {
	return `${formatCount(count)} ${count === 1 ? one : many}`;
}
