import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, finishedAnalysis, makeStudy, runAnalysis } from './materials.ts';

let server: ApiServer;
let client: Client;

beforeAll(async () => {
	server = await startApiServer();
	client = clientOf(server.origin, server.people.analyst);
});
afterAll(() => server.stop());

describe('curves of an analysis', () => {
	// Numbers of the worked example of four species: by hand, and for the fit by R (see the tests of the curves).
	it('come with every result', async () => {
		const ran = await runAnalysis(client, await bringMaterials(client, await makeStudy(client)), { seed: 7 });
		const { result } = await finishedAnalysis(client, ran.analysis);
		expect(result.ageClasses).toMatchObject([
			{ from: 1, nodes: 1, pairs: 1 },
			{ from: 2, nodes: 1, pairs: 2 },
			{ from: 4, nodes: 1, pairs: 3 }
		]);
		expect(result.fall?.fits.map(({ axes }) => axes)).toEqual([1, 2, 4]);
		expect(result.fall?.fits[0]?.halfOverlapAge).toBeCloseTo(3.80587279598113, 9);
		expect(result.influence?.slopes[0]?.slope).toBeCloseTo(-0.075, 12);
		expect(result.power?.rows.map(({ power }) => Math.max(...power))).toEqual([0, 0, 0, 0, 0]);
	});
});
