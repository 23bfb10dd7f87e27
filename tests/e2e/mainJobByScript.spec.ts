import { expect, test } from '@playwright/test';
import { meadowExpected, meadowMatrix, meadowTree, monteCarloRoom } from './support/meadow.ts';
import { tokenOf } from './support/signIn.ts';

const SHUFFLES = 99_999;

// The same job as in the browser, through the HTTP API that scripts rely on.
test('a script gets the same numbers', async ({ request, baseURL }) => {
	const headers = { authorization: `Bearer ${await tokenOf(baseURL ?? '', 'analyst')}` };
	const post = async (path: string, data: object, status: number) => {
		const answer = await request.post(`/api/v1${path}`, { headers, data });
		expect(answer.status(), await answer.text()).toBe(status);
		return answer.json();
	};

	const study = await post('/studies', { title: 'Meadow by script' }, 201);
	const trees = await post(`/studies/${study.id}/tree-sets`, { label: 'Dated tree', text: meadowTree }, 201);
	expect(trees).toMatchObject({ treeCount: 1, tipCount: 30, polytomies: 0 });
	const run = await post(`/studies/${study.id}/overlap-runs`, { label: 'D', measure: 'schoener-d', csv: meadowMatrix }, 201);
	expect(run.species).toHaveLength(30);

	const plan = { treeSet: trees.id, overlapRun: run.id, permutations: SHUFFLES, seed: 20261 };
	const asked = await post(`/studies/${study.id}/analyses`, plan, 202);
	let analysis = { status: asked.status, result: null as null | Record<string, any> }; // eslint-disable-line @typescript-eslint/no-explicit-any
	await expect(async () => {
		analysis = await (await request.get(`/api/v1/analyses/${asked.id}`, { headers })).json();
		expect(analysis.status).toBe('finished');
	}).toPass({ timeout: 60_000 });

	const result = analysis.result;
	expect(result?.regression.slope / meadowExpected.slope).toBeCloseTo(1, 9);
	expect(result?.regression.r).toBeCloseTo(meadowExpected.r, 9);
	expect(result?.nodeAverages.nested.slope / meadowExpected.nodesNested.slope).toBeCloseTo(1, 9);
	expect(Math.abs(result?.permutation.pLess - meadowExpected.pLess)).toBeLessThan(monteCarloRoom(meadowExpected.pLess, SHUFFLES));
	const within = meadowExpected.withinDeepestSplit.pLess;
	expect(Math.abs(result?.permutation.withinDeepestSplit.pLess - within)).toBeLessThan(monteCarloRoom(within, SHUFFLES));
	expect(result?.finding.kind).toBe('within-split-only');

	const again = await request.post(`/api/v1/studies/${study.id}/analyses`, { headers, data: plan });
	expect(again.status()).toBe(200);
	expect((await again.json()).id).toBe(asked.id);
});
