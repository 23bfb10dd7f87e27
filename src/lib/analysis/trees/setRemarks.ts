import { tipLabels } from '#lib/phylogeny/tree.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { extraTips } from './posteriorTrees.ts';
import { treeCalled, type UsedTrees } from './usedTrees.ts';

const NAMED = 5;

/** What to know of a test over all trees of a set: which are used, which is drawn, and which tips only some of them hold. */
export function setRemarks(used: UsedTrees): Remark[] {
	const displayed = used.trees[used.displayed];
	if (displayed === undefined) return [];
	const extra = extraTips(used.trees, new Set(tipLabels(displayed.tree)));
	const remarks = [
		remark(
			'information',
			'trees-averaged',
			`The test averages over ${used.trees.length.toLocaleString('en')} trees${choiceWords(used)}. ` +
				`The line, the node means and the figure are those of ${treeCalled(displayed)}.`,
			{ tree: displayed.index }
		)
	];
	if (extra.length === 0) return remarks;
	const more = extra.length > NAMED ? `, and ${extra.length - NAMED} more` : '';
	const message = `Some trees hold tips that ${treeCalled(displayed)} lacks; they are left out: ${extra.slice(0, NAMED).join(', ')}${more}.`;
	return [...remarks, remark('look', 'extra-tips', message)];
}

function choiceWords({ burnIn, thin, inText }: UsedTrees): string {
	if (burnIn === 0 && thin === 1) return '';
	const left = burnIn === 0 ? '' : `the first ${burnIn.toLocaleString('en')} left out`;
	const every = thin === 1 ? '' : `every ${thin}${ordinal(thin)} kept`;
	return ` of the ${inText.toLocaleString('en')} in the text (${[left, every].filter((part) => part !== '').join(', ')})`;
}

function ordinal(count: number): string {
	if (count % 100 >= 11 && count % 100 <= 13) return 'th';
	return ({ 1: 'st', 2: 'nd', 3: 'rd' } as const)[(count % 10) as 1] ?? 'th';
}
