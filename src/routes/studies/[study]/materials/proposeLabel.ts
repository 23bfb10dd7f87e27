import { MEASURE_NAMES, MEASURES } from '#lib/contracts/measure.ts';

const LONGEST = 200;

/** A name to begin with: the file’s without its ending, else what the text is. */
export function proposeLabel(fileName: string, kind: 'trees' | 'matrix' | null, measure: string | undefined): string {
	const fromFile = fileName
		.replace(/\.(nwk|newick|tre|trees?|nex|nexus|csv|tsv|tab|txt)$/i, '')
		.replaceAll(/[_\s]+/g, ' ')
		.trim();
	if (fromFile !== '') return fromFile.slice(0, LONGEST);
	if (kind === 'trees') return 'Dated tree';
	const known = MEASURES.find((one) => one === measure && one !== 'other');
	return known === undefined ? 'Niche overlap' : MEASURE_NAMES[known];
}
