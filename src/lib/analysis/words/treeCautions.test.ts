import { describe, expect, it } from 'vitest';
import { analyse } from '../analyse.ts';
import { MICRO_INPUTS, microPlan } from '../microResult.fixture.ts';
import { writeCaption } from './caption.ts';

const FALLS = '(((A:1,B:1):1,C:2):2,D:4);';
const RISES = '(((C:1,D:1):1,B:2):2,A:4);';

const analysed = (tree: number | 'all', ...trees: string[]) =>
	analyse({ ...MICRO_INPUTS, treeText: trees.join('\n') }, microPlan({ tree }));
const cautions = (...asked: Parameters<typeof analysed>) =>
	Object.fromEntries(analysed(...asked).finding.cautions.map(({ code, message }) => [code, message]));

describe('treeCautions', () => {
	it('warns where one tree of several was used, and not where all were', () => {
		expect(cautions(1, FALLS, FALLS)['posterior-ignored']).toBe(
			'One of 2 trees was used: what the dating leaves open is not in this p. Test over all of them.'
		);
		expect(cautions('all', FALLS, FALLS)['posterior-ignored']).toBeUndefined();
		expect(cautions(0, FALLS)['posterior-ignored']).toBeUndefined();
	});

	// By hand: on the first tree the worked example falls; on the other CD (0.5), BC and BD are the young pairs, AB (0.8) an old one.
	it('warns where the trees disagree about the direction, or about the root', () => {
		const found = cautions('all', FALLS, RISES, FALLS, RISES);
		expect(found['trees-disagree']).toBe(
			'Overlap falls with age in 50 % of the trees and rises in the others: the direction depends on the dating.'
		);
		expect(found['root-unsure']).toBe(
			'The commonest root split is that of 50 % of the trees. The test within the deepest split keeps to it in all of them.'
		);
		expect(cautions('all', FALLS, FALLS)).not.toHaveProperty('trees-disagree');
		expect(cautions('all', FALLS, FALLS)).not.toHaveProperty('root-unsure');
	});

	it('says that few trees are few', () => {
		expect(cautions('all', FALLS, FALLS)['few-trees']).toMatch(/^2 trees are few/);
		expect(cautions('all', ...new Array<string>(100).fill(FALLS))).not.toHaveProperty('few-trees');
	});
});

describe('the words of a test over all trees', () => {
	it('say so in the sentence and in the caption', () => {
		const result = analysed('all', FALLS, FALLS);
		expect(result.finding.sentence).toContain(
			'relabellings of the species fell as steeply, averaged over 2 trees, the one observed included'
		);
		expect(writeCaption(result)).toContain(
			'The test averages over 2 trees; drawn are tree 1 of the set, its line and its shuffles.'
		);
		expect(writeCaption(result)).toContain(
			'Bars in b, the middle 95 % of the ages of a clade over the trees; fine coloured lines in d'
		);
		expect(writeCaption(analysed(0, FALLS, FALLS))).not.toContain('averages');
	});
});
