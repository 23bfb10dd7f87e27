import { describe, expect, it } from 'vitest';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { readNicheTable } from '#lib/overlap/readNicheTable.ts';
import { analyse } from '../analyse.ts';
import { MICRO_INPUTS, microPlan } from '../microResult.fixture.ts';
import { previewAnalysis } from '../previewAnalysis.ts';

const signal = { variables: ['cell'] };

/** The worked example of four species: mean cells 1, 1.3, 1.7, 3, under names that need tidying. */
function withTable(text: string, change: Partial<AnalysisInputs> = {}): AnalysisInputs {
	return { ...MICRO_INPUTS, niches: { label: 'Positions', ...readNicheTable(text) }, ...change };
}
const four = withTable('species,cell,records\nD,3,9\nA,1,30\nB,1.3,12\nC,1.7,14\n');

describe('signalBlock', () => {
	it('is absent unless the plan asks for it', () => {
		expect(analyse(four, microPlan()).signal).toBeUndefined();
	});

	it('finds the K of the worked example whatever the order of the table, and reads records beside it', () => {
		const block = analyse(four, microPlan({ signal })).signal;
		expect(block?.variables.map(({ variable, role }) => [variable, role])).toEqual([
			['cell', 'position'],
			['records', 'records']
		]);
		// Exact fractions of the worked example.
		expect(block?.variables[0]?.k).toMatchObject({ p: 2 / 24, exact: true, count: 24, pAdjusted: 2 / 24 });
		expect(block?.variables[0]?.k.value).toBeCloseTo(29_271 / 17_185, 12);
		expect(block?.variables[0]?.models.map(({ weight }) => weight)).toEqual([null, null, null, null]);
		expect(block?.variables[0]?.notes).toEqual(['With 4 species the models are listed without weights.']);
	});

	it('uses standard errors only when every species has one', () => {
		const whole = analyse(withTable('s,cell,cell_se\nA,1,.1\nB,1.3,.1\nC,1.7,.1\nD,3,.1\n'), microPlan({ signal })).signal;
		const torn = analyse(withTable('s,cell,cell_se\nA,1,.1\nB,1.3,\nC,1.7,.1\nD,3,.1\n'), microPlan({ signal })).signal;
		expect(whole?.variables[0]?.measurementError).toBe(true);
		expect(torn?.variables[0]?.measurementError).toBe(false);
		expect(torn?.variables[0]?.notes).toContain('Standard errors are missing for some species, so none is used.');
	});

	it.each([
		['no table', MICRO_INPUTS, 'bring one with the materials'],
		['a variable it has not', withTable('s,depth\nA,1\nB,2\nC,3\nD,4\n'), 'has no variable “cell”. It has depth.'],
		['too few values', withTable('s,cell\nA,1\nB,2\nC,3\n'), '“cell” has values for 3 of the species compared'],
		['a constant', withTable('s,cell\nA,1\nB,1\nC,1\nD,1\n'), '“cell” is 1 for every species'],
		[
			'species without a branch between them',
			withTable('s,cell\nA,1\nB,2\nC,3\nD,4\n', { treeText: '(((A:0,B:0):1,C:1):2,D:3);' }),
			'Two species have no branch between them'
		]
	])('refuses %s before anything runs', (_, inputs, sentence) => {
		expect(() => previewAnalysis(inputs, microPlan({ signal }))).toThrow(sentence);
	});
});
