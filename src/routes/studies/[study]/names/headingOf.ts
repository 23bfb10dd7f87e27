import type { NameCounts } from '#lib/analysis/names/nameMatching.ts';

const WORDS = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine'];

/** The page’s heading: how many names need a person. */
export function headingOf({ open, pairs, species, tips }: NameCounts): string {
	if (open > 0) return `${WORDS[open] ?? open.toLocaleString('en')} ${open === 1 ? 'name needs' : 'names need'} you`;
	return pairs === species && pairs === tips ? `All ${pairs.toLocaleString('en')} names agree` : 'Every name is settled';
}
