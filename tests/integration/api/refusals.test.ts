import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { analysisStartedSchema, overlapRunCreatedSchema, treeSetCreatedSchema } from '#lib/contracts/answers.ts';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, CSV, makeStudy, MATRIX, runAnalysis, SPECIES, TREE, untilOver } from './materials.ts';

let server: ApiServer;
let client: Client;
let study: string;

beforeAll(async () => {
	server = await startApiServer();
	client = clientOf(server.origin, server.people.analyst);
	study = await makeStudy(client);
});
afterAll(() => server.stop());

const sendTree = (text: string, more: object = {}) =>
	client.refusal(`/studies/${study}/tree-sets`, { body: { label: 'T', text, ...more } });
const keepTree = (text: string, more: object = {}) =>
	client.post(`/studies/${study}/tree-sets`, { label: 'T', text, ...more }, treeSetCreatedSchema);
const sendCsv = (csv: string) =>
	client.refusal(`/studies/${study}/overlap-runs`, { body: { label: 'O', measure: 'schoener-d', csv } });

/** Brings both materials into a study of their own and sends a plan. */
async function refusedPlan(given: Parameters<typeof bringMaterials>[2], plan: object = {}) {
	const { treeSet, overlapRun, ...own } = await bringMaterials(client, await makeStudy(client), given);
	return client.refusal(`/studies/${own.study}/analyses`, { body: { treeSet, overlapRun, ...plan } });
}

describe('a tree text', () => {
	it.each([
		['empty', '', 'empty-text'],
		['of blanks', ' \n\t', 'empty-text'],
		['that is no tree', 'Dear colleague, the tree is attached.', 'not-a-tree'],
		['with an unclosed bracket', '((A:1,B:1):1,C:2;', undefined],
		['with a bracket too many', '((A:1,B:1):1,C:2));', undefined],
		['with two tips of one name', '((A:1,A:1):1,C:2);', 'duplicate-tip'],
		['with a negative length', '((A:1,B:-1):1,C:2);', 'negative-length'],
		['that is a network', '((A:1,B#H1:1):1,(B#H1:1,C:1):1);', 'network']
	])('%s is a 422 with a sentence and a place', async (_, text, code) => {
		const problem = await sendTree(text);
		expect(problem.status).toBe(422);
		if (code !== undefined) expect(problem.code).toBe(code);
		expect(problem.detail).toMatch(/\w.*[.!?]$/s);
		expect(problem.remarks).toHaveLength(1);
	});

	it('without lengths is kept with a remark to settle, and its ages are a 422', async () => {
		const kept = await keepTree('((A,B),C);');
		expect(kept.remarks.filter(({ level }) => level === 'settle').map(({ code }) => code)).toContain('missing-length');
		expect(kept).toMatchObject({ rootAge: null, ultrametricSpread: null });
		expect(await client.refusal(`/tree-sets/${kept.id}`)).toMatchObject({ status: 422, code: 'missing-length' });
		expect(await client.refusal(`/tree-sets/${kept.id}/mrca-ages`)).toMatchObject({ status: 422, code: 'missing-length' });
	});

	it('whose tips end at different times is kept with a remark to settle, and refuses the analysis', async () => {
		const tree = '(((Aa_one:1,Ab_two:2):1,Ac_three:2):2,Ad_four:4);';
		const kept = await keepTree(tree);
		expect(kept.remarks.map(({ level }) => level)).toContain('settle');
		const problem = await refusedPlan({ tree });
		expect(problem).toMatchObject({ status: 422, code: 'not-ultrametric' });
		expect(problem.remarks.map(({ code }) => code)).toContain('not-ultrametric');
	});

	it('with a spread that a person accepts is levelled', async () => {
		// 0.5 % of the depth: too much for rounding, little enough to accept
		const tree = '(((Aa_one:1,Ab_two:0.98):1,Ac_three:2):2,Ad_four:4);';
		expect(await refusedPlan({ tree })).toMatchObject({ status: 422, code: 'spread-needs-decision' });
		const accepted = await bringMaterials(client, await makeStudy(client), { tree, confirm: { spread: true } });
		await runAnalysis(client, accepted);
	});

	it('that is a star refuses the analysis', async () => {
		const problem = await refusedPlan({ tree: '(Aa_one:4,Ab_two:4,Ac_three:4,Ad_four:4);' });
		expect(problem).toMatchObject({ status: 422, code: 'star-tree' });
	});

	it('of several trees is tested over all of them, or by the one that is named', async () => {
		const tree = `${TREE}\n${TREE}`;
		expect(await refusedPlan({ tree }, { tree: 2 })).toMatchObject({ status: 422, code: 'no-such-tree' });
		const materials = await bringMaterials(client, await makeStudy(client), { tree });
		await runAnalysis(client, materials, { tree: 1 });
	});

	it('of 65 MiB is a 413 with the limit and the size found', async () => {
		const problem = await sendTree('x'.repeat(65 * 1024 * 1024));
		expect(problem).toMatchObject({ status: 413, code: 'text-too-large' });
		expect(problem.detail).toContain('64 MiB');
		expect(problem.detail).toContain('65 MiB');
	});

	it('that leaves nothing after burn-in is a 422', async () => {
		expect(await sendTree(TREE, { burnIn: 1 })).toMatchObject({ status: 422, code: 'burn-in-too-long' });
	});
});

describe('a matrix', () => {
	it.each([
		['empty', ''],
		['of words', 'species,A,B,C\nA,high,low,low\nB,low,high,low\nC,low,low,high'],
		['with a value out of range', CSV.replace('0.8', '7.5')],
		['with a species twice', CSV.replaceAll('Ab two', 'Aa one')],
		['that is no table', 'just one word']
	])('%s is a 422 with a sentence', async (_, csv) => {
		const problem = await sendCsv(csv);
		expect(problem.status).toBe(422);
		expect(problem.detail).toMatch(/\w.*[.!?]$/s);
	});

	it('that does not vary is kept with a remark to settle, and refuses the analysis', async () => {
		const csv = CSV.replaceAll(/0\.\d/g, '0.5');
		const problem = await refusedPlan({ csv });
		expect(problem).toMatchObject({ status: 422, code: 'constant-overlap' });
	});

	it('of distances is a remark until it is confirmed', async () => {
		const distances = MATRIX.values.map((row) => row.map((value) => Number((1 - value).toFixed(3))));
		const body = { label: 'O', measure: 'schoener-d', matrix: { species: SPECIES, values: distances } };
		const guessed = await client.post(`/studies/${study}/overlap-runs`, body, overlapRunCreatedSchema);
		expect(guessed.remarks.filter(({ level }) => level === 'settle')).not.toEqual([]);
		const settled = await client.post(
			`/studies/${study}/overlap-runs`,
			{ ...body, confirm: { kind: 'distance' } },
			overlapRunCreatedSchema
		);
		expect(settled.remarks.filter(({ level }) => level === 'settle')).toEqual([]);
	});

	it('with missing pairs refuses the analysis and names the fewest to leave out', async () => {
		const csv = CSV.replace('Ad four,0.4,0.4,0.5,1', 'Ad four,,,,1')
			.replace(/0\.4$/m, '')
			.replace(/,0\.4\n/g, ',\n')
			.replace(/,0\.5\n/g, ',\n');
		const problem = await refusedPlan({ csv });
		expect(problem).toMatchObject({ status: 422, code: 'missing-pairs' });
		expect(problem.detail).toContain('Ad four');
	});

	it('to be computed from maps is not offered yet', async () => {
		const body = { label: 'O', measure: 'schoener-d', source: { maps: ['m'] }, area: 'shared' };
		expect(await client.refusal(`/studies/${study}/overlap-runs`, { body })).toMatchObject({
			status: 422,
			code: 'not-offered-yet'
		});
	});

	it('given twice, or not at all, is a 400', async () => {
		const body = { label: 'O', measure: 'other' };
		expect(await client.refusal(`/studies/${study}/overlap-runs`, { body })).toMatchObject({ status: 400 });
		const both = { ...body, csv: CSV, matrix: MATRIX };
		expect(await client.refusal(`/studies/${study}/overlap-runs`, { body: both })).toMatchObject({ status: 400 });
	});
});

describe('a plan', () => {
	it('on fewer than four shared species is a 422', async () => {
		const three = await refusedPlan({ tree: '((Aa_one:1,Ab_two:1):1,Ac_three:2);' });
		expect(three).toMatchObject({ status: 422, code: 'too-few-species' });
		const two = await refusedPlan({ tree: '(Aa_one:1,Ab_two:1);' });
		expect(two).toMatchObject({ status: 422, code: 'too-few-tips' });
	});

	it('on materials without a shared name is a 422', async () => {
		const problem = await refusedPlan({ tree: '(((Xq:1,Yw:1):1,Zr:2):2,Vt:4);' });
		expect(problem).toMatchObject({ status: 422, code: 'no-shared-names' });
	});

	it('that asks for what is not computed yet is a 422, never a silence', async () => {
		expect(await refusedPlan({}, { robustness: {} })).toMatchObject({ status: 422, code: 'not-offered-yet' });
		expect(await refusedPlan({}, { covariates: ['c'] })).toMatchObject({ status: 404 });
	});

	it('with a wrong or unknown field is a 400 that names it', async () => {
		const materials = await bringMaterials(client, await makeStudy(client));
		const send = (plan: object) =>
			client.refusal(`/studies/${materials.study}/analyses`, { body: { ...materials, study: undefined, ...plan } });
		expect((await send({ permutation: 10 })).detail).toContain('permutation');
		expect((await send({ permutations: 1_000_001 })).detail).toContain('permutations');
		expect((await send({ statistic: 'guess' })).detail).toContain('statistic');
		expect((await send({ alpha: 2 })).status).toBe(400);
		expect((await send({ seed: -1 })).status).toBe(400);
	});

	it('leaves out a species that is not shared, with a remark', async () => {
		const tree = '((((Aa_one:1,Ab_two:1):1,Ac_three:2):2,Ad_four:4):1,Ae_five:5);';
		const { study: own, treeSet, overlapRun } = await bringMaterials(client, await makeStudy(client), { tree });
		const started = await client.post(`/studies/${own}/analyses`, { treeSet, overlapRun }, analysisStartedSchema);
		expect(started.remarks.some(({ message }) => message.includes('Ae five'))).toBe(true);
		await untilOver(client, started.id);
	});
});

describe('a request', () => {
	it.each([
		['of malformed JSON', '{"title": '],
		['of no JSON at all', 'title=Frogs'],
		['without a body', ''],
		['that is a list', '[]'],
		['with an extra field', '{"title":"A","owner":"me"}'],
		['with a field of another type', '{"title":7}'],
		['with a NUL in a name', '{"title":"A\\u0000B"}'],
		['with half a surrogate pair', '{"title":"\\ud800"}'],
		['nested without end', `{"title":${'['.repeat(100_000)}${']'.repeat(100_000)}}`],
		['with a prototype', '{"title":"A","__proto__":{"isLead":true}}']
	])('%s is a 400', async (_, raw) => {
		const problem = await client.refusal('/studies', { raw, method: 'POST' });
		expect(problem.status).toBe(400);
		expect(problem.detail).toMatch(/\.$/);
	});

	it('larger than its limit is a 413 before it is read', async () => {
		const problem = await client.refusal('/studies', { body: { title: 'x'.repeat(17 * 1024 * 1024) } });
		expect(problem).toMatchObject({ status: 413, code: 'body-too-large' });
		expect(problem.detail).toContain('16 MiB');
	});

	it('to an address that is none is a 404 problem, whatever the method', async () => {
		for (const method of ['GET', 'POST', 'DELETE']) {
			expect(await client.refusal('/no/such/call', { method })).toMatchObject({ status: 404 });
		}
	});

	it('with a method that the address does not take is a 405 problem', async () => {
		expect(await client.refusal(`/studies/${study}`, { method: 'DELETE' })).toMatchObject({ status: 405 });
	});

	it('with a query that is not described is a 400', async () => {
		const { id } = await keepTree(TREE);
		expect(await client.refusal(`/tree-sets/${id}?tree=first`)).toMatchObject({ status: 400 });
		expect(await client.refusal(`/tree-sets/${id}?tre=0`)).toMatchObject({ status: 400 });
	});

	it('for a result that is not there yet is a 422', async () => {
		const { treeSet, overlapRun, ...own } = await bringMaterials(client, await makeStudy(client));
		const { id } = await client.post(`/studies/${own.study}/analyses`, { treeSet, overlapRun }, analysisStartedSchema);
		await client.fetch(`/analyses/${id}/stop`, { method: 'POST' });
		const plate = await client.fetch(`/analyses/${id}/plate.svg`);
		// four species may finish before the stop arrives
		expect([200, 422]).toContain(plate.status);
		if (plate.status === 422) expect(await plate.json()).toMatchObject({ code: 'not-finished' });
	});
});
