import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { covariateAnswerSchema, covariateCreatedSchema, studyAnswerSchema } from '#lib/contracts/answers.ts';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, finishedAnalysis, makeStudy, runAnalysis, type Materials } from './materials.ts';

let server: ApiServer;
let client: Client;
let materials: Materials;

beforeAll(async () => {
	server = await startApiServer();
	client = clientOf(server.origin, server.people.analyst);
	materials = await bringMaterials(client, await makeStudy(client, server.people.lab));
});
afterAll(() => server.stop());

/** Positions 0, 1, 3, 7 on a line, as in the worked example, under the names of the matrix. */
const DISTANCE = 'species,Aa one,Ab two,Ac three,Ad four\nAa one,0\nAb two,1,0\nAc three,3,2,0\nAd four,7,6,4,0';
const PLACES = 'species,latitude,longitude\nAa one,0,0\nAb two,0,90\nAc three,90,0\nAd four,0,180';

function keep(body: object) {
	return client.post(`/studies/${materials.study}/covariates`, { label: 'distance', ...body }, covariateCreatedSchema);
}

describe('covariates', () => {
	it('are kept as they stand, found again and listed with the study', async () => {
		const { id, species, remarks } = await keep({ csv: DISTANCE });
		expect(species).toEqual(['Aa one', 'Ab two', 'Ac three', 'Ad four']);
		expect(remarks).toEqual([]);
		const found = await client.get(`/covariates/${id}`, covariateAnswerSchema);
		expect(found).toMatchObject({ label: 'distance', reading: { source: 'matrix', kind: 'distance', scale: 'plain' } });
		expect(found.values[3]).toEqual([7, 6, 4, null]);
		const study = await client.get(`/studies/${materials.study}`, studyAnswerSchema);
		expect(study.covariates).toContainEqual(expect.objectContaining({ id, label: 'distance', speciesCount: 4 }));
	});

	// A quarter and a half of the circumference of a sphere of radius 6371.0088 km.
	it('are computed from a table of places', async () => {
		const { id } = await keep({ places: PLACES });
		const { values, reading } = await client.get(`/covariates/${id}`, covariateAnswerSchema);
		expect(values[1]?.[0]).toBeCloseTo(10_007.557, 3);
		expect(values[3]?.[0]).toBeCloseTo(20_015.114, 3);
		expect(reading).toMatchObject({ source: 'places', unit: 'km' });
	});

	// Exact counts of the worked example: residuals moved 3 of 24, whole overlaps 2 of 24.
	it('are allowed for by a plan that names them', async () => {
		const { id } = await keep({ csv: DISTANCE });
		const { analysis } = await runAnalysis(client, materials, { seed: 3, covariates: [id] });
		const { result, plan } = await finishedAnalysis(client, analysis);
		expect(plan.covariates).toEqual([id]);
		expect(result.partial).toMatchObject({ p: 3 / 24, raw: { p: 2 / 24 } });
		expect(result.matrixRegression?.rSquared).toBeCloseTo(10147 / 10960, 12);
		expect(result.matrixRegression?.coefficients.map(({ name }) => name)).toEqual(['age', 'distance']);
		// The test itself is the same with and without.
		expect(result.permutation.asExtreme).toBe(2);
	});

	it.each([
		[422, 'negative-value', { csv: DISTANCE.replace('7,6,4', '7,-6,4') }],
		[422, 'no-place-columns', { places: 'species,latitude\nAa one,0\nAb two,1' }],
		[400, 'malformed-body', {}],
		[400, 'malformed-body', { csv: DISTANCE, places: PLACES }]
	])('are refused with %i %s', async (status, code, body) => {
		const refusal = await client.refusal(`/studies/${materials.study}/covariates`, { body: { label: 'distance', ...body } });
		expect(refusal).toMatchObject({ status, code });
	});

	it('are refused by a plan when they say the same as age, and when they are not there', async () => {
		const { id } = await keep({
			label: 'twice the age',
			csv: DISTANCE.replace('7,6,4', '8,8,8').replace('3,2', '4,4').replace('two,1', 'two,2')
		});
		const { study, treeSet, overlapRun } = materials;
		const ask = (covariates: string[]) =>
			client.refusal(`/studies/${study}/analyses`, { body: { treeSet, overlapRun, covariates } });
		expect(await ask([id])).toMatchObject({ status: 422, code: 'collinear' });
		expect((await ask([id])).detail).toContain('“twice the age” is a linear function of “age”');
		expect(await ask(['nowhere'])).toMatchObject({ status: 404 });
	});

	it('are nobody else’s to see', async () => {
		const { id } = await keep({ csv: DISTANCE });
		const stranger = clientOf(server.origin, server.people.stranger);
		expect(await stranger.refusal(`/covariates/${id}`)).toMatchObject({ status: 404 });
		const reader = clientOf(server.origin, server.people.reader);
		expect((await reader.fetch(`/studies/${materials.study}/covariates`, { body: { label: 'x', csv: DISTANCE } })).status).toBe(
			403
		);
		expect(z.unknown().parse(await (await reader.fetch(`/covariates/${id}`)).json())).toMatchObject({ id });
	});
});
