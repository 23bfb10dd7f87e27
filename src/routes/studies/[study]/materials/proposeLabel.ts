import type { MaterialKind } from '#lib/contracts/materialForms.ts';
import { MEASURE_NAMES, MEASURES } from '#lib/contracts/measure.ts';

const LONGEST = 200;

export type LabelGround = {
	/** '' for a pasted text */
	readonly fileName: string;
	readonly kind: MaterialKind | null;
	readonly measure?: string | undefined;
	/** the label of what the text shall replace, which goes before all others */
	readonly former?: string | undefined;
	/** labels of the kept materials of this kind */
	readonly taken: readonly string[];
};

/** A name to begin with: what is replaced, else the file’s without its ending, else what the text is; numbered when it is taken. */
export function proposeLabel(ground: LabelGround): string {
	return numbered(bareLabel(ground), ground.taken);
}

/** The label a text goes by: what was typed, unless it is a proposal that nobody has touched; that follows what is learnt. */
export function labelOf(typed: string, ground: LabelGround): string {
	const proposal = proposeLabel(ground);
	if (typed === '') return proposal;
	const isOfNow = [typed, withoutNumber(typed)].includes(bareLabel(ground));
	if (isOfNow && !ground.taken.includes(typed)) return typed;
	return isProposal(typed, ground) ? proposal : typed;
}

function isProposal(typed: string, ground: LabelGround): boolean {
	const proposals = [undefined, ...MEASURES].map((measure) => bareLabel({ ...ground, measure }));
	return proposals.includes(typed) || proposals.includes(withoutNumber(typed));
}

function bareLabel({ fileName, kind, measure, former }: LabelGround): string {
	if (former !== undefined) return former;
	const fromFile = fileName
		.replace(/\.(nwk|newick|tre|trees?|nex|nexus|csv|tsv|tab|txt)$/i, '')
		.replaceAll(/[_\s]+/g, ' ')
		.trim();
	if (fromFile !== '') return fromFile.slice(0, LONGEST);
	if (kind === 'trees') return 'Dated tree';
	if (kind === 'covariate') return 'Distance';
	if (kind === 'niches') return 'Niche positions';
	const known = MEASURES.find((one) => one === measure && one !== 'other');
	return known === undefined ? 'Niche overlap' : MEASURE_NAMES[known];
}

const withoutNumber = (label: string) => label.replace(/ \(\d+\)$/, '');

function numbered(label: string, taken: readonly string[]): string {
	let proposal = label;
	for (let number = 2; taken.includes(proposal); number++) {
		const ending = ` (${number})`;
		proposal = label.slice(0, LONGEST - ending.length) + ending;
	}
	return proposal;
}
