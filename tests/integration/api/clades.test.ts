import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, finishedAnalysis, makeStudy, runAnalysis, type Ran } from './materials.ts';

let server: ApiServer;
let client: Client;
let ran: Ran;

beforeAll(async () => {
	server = await startApiServer();
	client = clientOf(server.origin, server.people.analyst);
	const asked = { seed: 7, clades: {}, alsoTest: ['nodes-nested', 'slope'] };
	ran = await runAnalysis(client, await bringMaterials(client, await makeStudy(client)), asked);
});
afterAll(() => server.stop());

describe('a plan that asks about clades and further statistics', () => {
	// By hand in exact fractions, from the worked example of four species: 7/10 inside A, B, C, 13/30 with D, 6 of 24
	// arrangements; slope and nested node slope are as low in the same 2 of 24, within ABC | D in 2 of 6.
	it('gives the numbers worked out by hand', async () => {
		const { result, plan } = await finishedAnalysis(client, ran.analysis);
		expect(plan).toMatchObject({ clades: { minTips: 3 }, alsoTest: ['nodes-nested', 'slope'] });
		expect(result.cladeTest).toEqual({ exact: true, count: 24, minTips: 3 });
		const [clade, ...others] = result.clades ?? [];
		expect(others).toEqual([]);
		expect(clade).toMatchObject({ tips: 3, p: 6 / 24, pAdjusted: 6 / 24, smallestP: 1 / 4, testable: false, holds: false });
		expect(clade?.difference).toBeCloseTo(4 / 15, 12);
		expect(result.permutation.pAdjusted).toBeCloseTo(2 / 24, 12);
		expect(result.permutation.also).toMatchObject([{ statistic: 'nodes-nested', withinDeepestSplit: { exact: true } }]);
		expect(result.permutation.also?.[0]?.withinDeepestSplit?.pLess).toBeCloseTo(2 / 6, 12);
		expect(result.sisters).toMatchObject({ cherries: 1, others: 5 });
	});

	it('lists the clades as a table', async () => {
		const text = await (await client.fetch(`/analyses/${ran.analysis}/clades.csv`)).text();
		const [headings, line, ...rest] = text.trim().split('\r\n');
		expect(headings).toBe(
			'node,clade,age,tips,mean_within,mean_between,difference,p,p_adjusted,clade_above,p_beyond_parent,p_beyond_parent_adjusted,smallest_p,testable,marked,species'
		);
		expect(rest).toEqual([]);
		const cells = line?.split(',') ?? [];
		expect(cells.slice(2, 4)).toEqual(['2', '3']);
		expect(cells[7]).toBe('0.25');
		expect(cells[10]).toBe('');
		expect(cells.slice(-3)).toEqual(['no', 'no', 'Aa one; Ab two; Ac three']);
	});

	it('takes clades declared by their species, and names those it does not know', async () => {
		const { study, treeSet, overlapRun } = ran;
		const plan = (declared: string[][]) => ({ treeSet, overlapRun, seed: 7, clades: { declared } });
		const own = await runAnalysis(client, { study, treeSet, overlapRun }, plan([['Ab two', 'Ac three']]));
		const { result } = await finishedAnalysis(client, own.analysis);
		// By hand: BC .6; with A and D .8, .7, .4, .5, mean .6: no difference. No clade of this tree.
		expect(result.clades).toMatchObject([{ node: null, declared: true, tips: 2, pBeyondParent: null }]);
		expect(result.clades?.[0]?.difference).toBeCloseTo(0, 12);
		const body = plan([['Ab two', 'Az none']]);
		const problem = await client.refusal(`/studies/${study}/analyses`, { body });
		expect(problem).toMatchObject({ status: 422, code: 'unknown-species' });
		expect(problem.detail).toContain('Az none');
	});

	it('is refused where no clade is large enough, before it runs', async () => {
		const { study, treeSet, overlapRun } = ran;
		const body = { treeSet, overlapRun, clades: { minTips: 4 } };
		expect(await client.refusal(`/studies/${study}/analyses`, { body })).toMatchObject({ status: 422, code: 'no-clades' });
	});
});
