import type { Component } from 'svelte';
import { ALSO_TESTED, CLADES, SISTERS } from './cladeSections.ts';
import { COVARIATES } from './covariateSections.ts';
import { CURVES } from './curveSections.ts';
import { nodeSentence } from './nodeSentence.ts';
import { SIGNAL } from './signalSections.ts';
import { TREES } from './treeSection.ts';
import type { Findings } from './findingsView.ts';

/**
 * A part of the findings page below the plate. To add one: write `sections/YourPart.svelte`, which takes `{ findings }` and
 * draws one figure or table, then add an entry to the list below; heading, sentence and caution are drawn by `ResultSection.svelte`.
 */
export type ResultSection = {
	/** anchor in the page; words with dashes */
	readonly id: string;
	readonly title: string;
	/** one sentence with the number in it; null where the result does not hold this part, which then does not appear */
	readonly sentence: (findings: Findings) => string | null;
	/** what must stand beside the number, or null */
	readonly caution?: (findings: Findings) => string | null;
	/** the figure or table, fetched when the reader comes near */
	readonly load: () => Promise<{ default: Component<{ findings: Findings }> }>;
};

/** In the order of the page. */
export const RESULT_SECTIONS: readonly ResultSection[] = [
	{
		id: 'node-averages',
		title: 'Node averages',
		sentence: nodeSentence,
		load: () => import('./sections/NodeAverages.svelte')
	},
	...CURVES,
	TREES,
	ALSO_TESTED,
	COVARIATES,
	CLADES,
	SISTERS,
	SIGNAL
];

/** The parts that a result holds. */
export function sectionsOf(findings: Findings): readonly ResultSection[] {
	return RESULT_SECTIONS.filter(({ sentence }) => sentence(findings) !== null);
}

export type ContentsEntry = { readonly id: string; readonly title: string };

/** The page in short, for its list of contents. */
export function contentsOf(findings: Findings): readonly ContentsEntry[] {
	return [
		{ id: 'plate', title: 'The plate' },
		{ id: 'how-far', title: 'How far this goes' },
		...sectionsOf(findings).map(({ id, title }) => ({ id, title })),
		{ id: 'every-number', title: 'Every number' }
	];
}
