import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { analysisAnswerSchema, nicheTableAnswerSchema, studyAnswerSchema, treeSetAnswerSchema } from '#lib/contracts/answers.ts';
import { treeAboutSchema } from '#lib/contracts/treeAbout.ts';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, makeStudy, runAnalysis, SPECIES } from './materials.ts';

let server: ApiServer;
let client: Client;
const csv = ['species,cell,cell_se,records', ...SPECIES.map((name, index) => `${name},${index * index},0.1,${9 + index}`)].join(
	'\n'
);

beforeAll(async () => {
	server = await startApiServer();
	client = clientOf(server.origin, server.people.analyst);
});
afterAll(() => server.stop());

describe('tables of niche positions', () => {
	it('are kept, listed and given back, and refused with the place of what is wrong', async () => {
		const study = await makeStudy(client);
		const kept = await client.post(`/studies/${study}/niche-tables`, { label: 'Positions', csv }, nicheTableAnswerSchema);
		expect(kept.variables.map(({ name, role }) => [name, role])).toEqual([
			['cell', 'position'],
			['records', 'records']
		]);
		expect(kept.remarks.map(({ code }) => code)).toEqual(['column-role']);
		expect(await client.get(`/niche-tables/${kept.id}`, nicheTableAnswerSchema)).toEqual(kept);
		const held = await client.get(`/studies/${study}`, studyAnswerSchema);
		expect(held.nicheTables).toMatchObject([{ id: kept.id, variables: ['cell', 'records'], speciesCount: SPECIES.length }]);
		const refused = await client.refusal(`/studies/${study}/niche-tables`, {
			body: { label: 'x', csv: 'species,cell\nA,warm\n' }
		});
		expect(refused).toMatchObject({ status: 422, code: 'not-a-number' });
		const stranger = clientOf(server.origin, server.people.stranger);
		expect((await stranger.fetch(`/niche-tables/${kept.id}`)).status).toBe(404);
	});

	it('give the signal that a plan asks for, of the newest table', async () => {
		const study = await makeStudy(client);
		const materials = await bringMaterials(client, study);
		const without = await client.refusal(`/studies/${study}/analyses`, {
			body: { treeSet: materials.treeSet, overlapRun: materials.overlapRun, signal: { variables: ['cell'] } }
		});
		expect(without).toMatchObject({ status: 422, code: 'no-niche-table' });
		const table = await client.post(`/studies/${study}/niche-tables`, { label: 'Positions', csv }, nicheTableAnswerSchema);
		const ran = await runAnalysis(client, materials, { seed: 3, signal: { variables: ['cell'] } });
		const { plan, result } = await client.get(`/analyses/${ran.analysis}`, analysisAnswerSchema);
		expect(plan.signal).toEqual({ variables: ['cell'], table: table.id });
		expect(result?.signal?.variables.map(({ variable, measurementError }) => [variable, measurementError])).toEqual([
			['cell', true],
			['records', false]
		]);
	});
});

describe('PUT /tree-sets/{treeSet}/about', () => {
	it('keeps what only the author of a tree knows', async () => {
		const study = await makeStudy(client, server.people.lab);
		const { treeSet } = await bringMaterials(client, study);
		const about = treeAboutSchema.parse({ speciesInClade: 12, placement: 'some-placed', placedTips: ['A'], source: 'A thesis' });
		const response = await client.fetch(`/tree-sets/${treeSet}/about`, { method: 'PUT', body: about });
		expect(response.status).toBe(200);
		expect((await client.get(`/tree-sets/${treeSet}`, treeSetAnswerSchema)).about).toEqual(about);
		const reader = clientOf(server.origin, server.people.reader);
		expect((await reader.fetch(`/tree-sets/${treeSet}/about`, { method: 'PUT', body: about })).status).toBe(403);
	});
});
