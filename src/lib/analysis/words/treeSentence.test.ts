import { describe, expect, it } from 'vitest';
import { analyse } from '../analyse.ts';
import { MICRO_INPUTS, microPlan } from '../microResult.fixture.ts';
import { treeSentence, TREES_CAUTION } from './treeSentence.ts';

const FALLS = '(((A:1,B:1):1,C:2):2,D:4);';
const RISES = '(((C:1,D:1):1,B:2):2,A:4);';

function said(...trees: string[]): string {
	const { trees: block } = analyse({ ...MICRO_INPUTS, treeText: trees.join('\n') }, microPlan({ tree: 'all' }));
	return block === undefined ? '' : treeSentence(block, 'Ma');
}

describe('treeSentence', () => {
	// Worked example: -31/265 is -0.117 per Myr, whatever the quantile of equal trees.
	it('tells median, middle 95 % and the share of trees that fall', () => {
		expect(said(FALLS, FALLS)).toBe(
			'Over 2 trees the slope has a median of −0.117 per Myr, and the middle 95 % of the trees lie from −0.117 to −0.117; ' +
				'overlap falls with age in every tree. The p of the finding is that of the statistic averaged over all of them.'
		);
		expect(said(FALLS, RISES)).toContain('overlap falls with age in 50 % of the trees.');
		expect(said(RISES, RISES)).toContain('overlap falls with age in no tree.');
	});

	it('is never without the words that it is no probability', () => {
		expect(TREES_CAUTION).toContain('sensitivity to the dating, not probability');
	});
});
