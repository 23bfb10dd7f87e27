import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import {
	namesAnswerSchema,
	overlapRunAnswerSchema,
	squareSchema,
	studiesAnswerSchema,
	studyAnswerSchema,
	tokenAnswerSchema,
	treeSetAnswerSchema,
	treeSetCreatedSchema
} from '#lib/contracts/answers.ts';
import { CALLS } from '#lib/server/api/calls.ts';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, makeStudy, MATRIX, runAnalysis, SPECIES, TREE, type Ran } from './materials.ts';

let server: ApiServer;
let client: Client;
let ran: Ran;

beforeAll(async () => {
	server = await startApiServer();
	client = clientOf(server.origin, server.people.analyst);
	ran = await runAnalysis(client, await bringMaterials(client, await makeStudy(client)), { seed: 7 });
});
afterAll(() => server.stop());

describe('POST /tokens', () => {
	it('gives a token that works', async () => {
		const { email, passphrase } = server.people.reader;
		const nobody = clientOf(server.origin, null);
		const { token } = await nobody.post('/tokens', { email, password: passphrase, label: 'notebook' }, tokenAnswerSchema);
		const response = await fetch(`${server.origin}/api/v1/studies`, { headers: { authorization: `Bearer ${token}` } });
		expect(response.status).toBe(200);
	});

	it('refuses a wrong passphrase in the words of an unknown address, then asks to wait', async () => {
		const nobody = clientOf(server.origin, null);
		const wrong = { email: server.people.stranger.email, password: 'not this one at all', label: 'x' };
		const unknown = await nobody.refusal('/tokens', { body: { ...wrong, email: 'nobody@lab.example' } });
		const first = await nobody.refusal('/tokens', { body: wrong });
		expect(first).toMatchObject({ status: 401, code: 'wrong-passphrase', detail: unknown.detail });
		const statuses: number[] = [];
		for (let i = 0; i < 6; i++) statuses.push((await nobody.fetch('/tokens', { body: wrong })).status);
		expect(statuses).toContain(429);
		const waiting = await nobody.fetch('/tokens', { body: wrong });
		expect(Number(waiting.headers.get('retry-after'))).toBeGreaterThan(0);
	});
});

describe('studies', () => {
	it('lists the studies of the labs one belongs to', async () => {
		const shared = await makeStudy(clientOf(server.origin, server.people.lead), server.people.lab);
		const mine = await client.get('/studies', studiesAnswerSchema);
		expect(mine.map(({ id }) => id)).toContain(shared);
		const others = await clientOf(server.origin, server.people.stranger).get('/studies', studiesAnswerSchema);
		expect(others.map(({ id }) => id)).not.toContain(shared);
	});

	it('makes a study in the own lab when none is named', async () => {
		const study = await client.get(`/studies/${ran.study}`, studyAnswerSchema);
		expect(study.lab).toBe(server.people.analyst.user.ownLab);
	});

	it('tells what a study holds', async () => {
		const study = await client.get(`/studies/${ran.study}`, studyAnswerSchema);
		expect(study.treeSets.map(({ id }) => id)).toContain(ran.treeSet);
		expect(study.overlapRuns.map(({ id }) => id)).toContain(ran.overlapRun);
		expect(study.analyses.map(({ id }) => id)).toContain(ran.analysis);
	});
});

describe('tree sets', () => {
	it('tells what was read', async () => {
		const study = await makeStudy(client);
		const read = await client.post(`/studies/${study}/tree-sets`, { label: 'Tree', text: TREE }, treeSetCreatedSchema);
		// by hand from the text
		expect(read).toMatchObject({ treeCount: 1, tipCount: 4, polytomies: 0, rootAge: 4 });
		expect(read.ultrametricSpread).toBeLessThan(1e-12);
		expect(read.remarks.filter(({ level }) => level === 'settle')).toEqual([]);
	});

	it('gives nodes with ages, and members when asked', async () => {
		const tree = await client.get(`/tree-sets/${ran.treeSet}?members=1`, treeSetAnswerSchema);
		// by hand: preorder of (((A,B),C),D); an unquoted underscore is a blank
		expect(tree.tips).toEqual(SPECIES);
		expect(tree.rootAge).toBe(4);
		expect(tree.nodes.map(({ parent, age, tips }) => [parent, age, tips])).toEqual([
			[null, 4, 4],
			[0, 2, 3],
			[1, 1, 2],
			[2, 0, 1],
			[2, 0, 1],
			[1, 0, 1],
			[0, 0, 1]
		]);
		expect(tree.nodes[1]?.members).toEqual(SPECIES.slice(0, 3));
		expect(tree.nodes[5]?.members).toEqual(['Ac three']);
		const plain = await client.get(`/tree-sets/${ran.treeSet}`, treeSetAnswerSchema);
		expect(plain.nodes[0]).not.toHaveProperty('members');
	});

	it('chooses among the trees of a posterior set after burn-in and thinning', async () => {
		const study = await makeStudy(client);
		// trees whose root age tells their place: 1, 2, … 6
		const text = [1, 2, 3, 4, 5, 6].map((age) => `((A:${age / 2},B:${age / 2}):${age / 2},C:${age});`).join('\n');
		const read = await client.post(`/studies/${study}/tree-sets`, { label: 'T', text, burnIn: 1, thin: 2 }, treeSetCreatedSchema);
		expect(read).toMatchObject({ treeCount: 3, rootAge: 2 });
		const third = await client.get(`/tree-sets/${read.id}?tree=2`, treeSetAnswerSchema);
		expect(third).toMatchObject({ rootAge: 6, kind: 'posterior' });
		expect(await client.refusal(`/tree-sets/${read.id}?tree=3`)).toMatchObject({ status: 422, code: 'no-such-tree' });
	});

	it('gives MRCA ages as a matrix and as a table that agree', async () => {
		// by hand: ages 1, 2 and 4
		const ages = [
			[0, 1, 2, 4],
			[1, 0, 2, 4],
			[2, 2, 0, 4],
			[4, 4, 4, 0]
		];
		expect(await client.get(`/tree-sets/${ran.treeSet}/mrca-ages`, squareSchema)).toEqual({ species: SPECIES, values: ages });
		const table = await client.fetch(`/tree-sets/${ran.treeSet}/mrca-ages`, { headers: { accept: 'text/csv' } });
		expect(table.headers.get('content-type')).toContain('text/csv');
		const lines = [['species', ...SPECIES], ...ages.map((row, i) => [SPECIES[i], ...row])].map((row) => row.join(','));
		expect(await table.text()).toBe(`${lines.join('\r\n')}\r\n`);
	});

	it('gives MRCA ages of the species asked for, in their order', async () => {
		const path = `/tree-sets/${ran.treeSet}/mrca-ages?species=${encodeURIComponent('Ad four,Aa one')}`;
		const asked = { species: ['Ad four', 'Aa one'], values: [[0, 4], [4, 0]] }; // prettier-ignore
		expect(await client.get(path, squareSchema)).toEqual(asked);
		const table = await client.fetch(path, { headers: { accept: 'text/csv' } });
		expect(await table.text()).toBe('species,Ad four,Aa one\r\nAd four,0,4\r\nAa one,4,0\r\n');
		const unknown = await client.refusal(`/tree-sets/${ran.treeSet}/mrca-ages?species=Nobody`);
		expect(unknown).toMatchObject({ status: 422, code: 'unknown-species' });
	});
});

describe('overlap runs', () => {
	it('gives back what was sent, with a summary', async () => {
		const run = await client.get(`/overlap-runs/${ran.overlapRun}`, overlapRunAnswerSchema);
		expect(run).toMatchObject({ status: 'finished', measure: 'schoener-d', species: SPECIES, values: MATRIX.values });
		// by hand: 0.4 0.4 0.5 0.6 0.7 0.8
		expect(run.summary).toMatchObject({ species: 4, pairs: 6, missing: 0, min: 0.4, max: 0.8 });
		expect(run.summary.mean).toBeCloseTo(3.4 / 6, 12);
		expect(run.summary.median).toBeCloseTo(0.55, 12);
	});

	it('takes a matrix as numbers and writes a missing pair as null', async () => {
		const study = await makeStudy(client);
		const values = MATRIX.values.map((row, i) => row.map((value, j) => (i + j === 5 ? null : value)));
		const body = { label: 'M', measure: 'other', matrix: { species: SPECIES, values } };
		const { id } = await client.post(`/studies/${study}/overlap-runs`, body, z.object({ id: z.string() }));
		const text = await (await client.fetch(`/overlap-runs/${id}`)).text();
		expect(text).not.toContain('NaN');
		const run = overlapRunAnswerSchema.parse(JSON.parse(text));
		expect(run.values[2]?.[3]).toBeNull();
		expect(run.summary).toMatchObject({ pairs: 5, missing: 1 });
	});
});

describe('names', () => {
	it('puts exactly the sent decisions in force', async () => {
		const study = await makeStudy(client);
		await bringMaterials(client, study);
		const put = (decisions: object[]) => client.fetch(`/studies/${study}/names`, { method: 'PUT', body: { decisions } });
		expect(
			(
				await put([
					{ from: 'Aa one', to: null, why: 'a hybrid' },
					{ from: 'Ab two', to: 'Ab_two' }
				])
			).status
		).toBe(200);
		const first = await client.get(`/studies/${study}/names`, namesAnswerSchema);
		expect(first.decisions.map(({ from, to, why }) => [from, to, why])).toEqual([
			['Aa one', null, 'a hybrid'],
			['Ab two', 'Ab two', '']
		]);
		expect(first.matching?.pairs).toHaveLength(3);
		expect((await put([])).status).toBe(200);
		const second = await client.get(`/studies/${study}/names`, namesAnswerSchema);
		expect(second.decisions).toEqual([]);
		expect(second.matching?.pairs).toHaveLength(4);
	});

	it('proposes what is spelled nearly alike and uses it only once it is accepted', async () => {
		const study = await makeStudy(client);
		await bringMaterials(client, study, { tree: TREE.replace('Ad_four', 'Ad_foour') });
		const before = (await client.get(`/studies/${study}/names`, namesAnswerSchema)).matching;
		expect(before?.pairs).toHaveLength(3);
		expect(before?.open.map(({ species, tip }) => [species, tip])).toContainEqual(['Ad four', 'Ad foour']);
		const decisions = [{ from: 'Ad_four', to: 'Ad_foour' }];
		const put = await client.fetch(`/studies/${study}/names`, { method: 'PUT', body: { decisions } });
		expect(namesAnswerSchema.parse(await put.json()).matching).toMatchObject({ open: [], dropped: [] });
	});

	it('tells materials without a name in common in the same form', async () => {
		const study = await makeStudy(client);
		await bringMaterials(client, study, { tree: '(((Xq:1,Yw:1):1,Zr:2):2,Vt:4);' });
		const { matching } = await client.get(`/studies/${study}/names`, namesAnswerSchema);
		expect(matching?.pairs).toEqual([]);
		expect(matching?.dropped).toHaveLength(8);
		expect(matching?.sentence).toContain('no name is the same or near');
	});

	it('lists every name that is in no material', async () => {
		const decisions = [{ from: 'Aa one', to: 'Nowhere' }, { from: 'Ab two', to: 'Neither' }]; // prettier-ignore
		const problem = await client.refusal(`/studies/${ran.study}/names`, { method: 'PUT', body: { decisions } });
		expect(problem).toMatchObject({ status: 422, code: 'unknown-tip' });
		expect(problem.detail).toContain('Nowhere, Neither');
	});
});

describe('GET /openapi.json', () => {
	it('describes every call, for everybody', async () => {
		const api = z
			.object({ openapi: z.string(), paths: z.record(z.string(), z.record(z.string(), z.object({ operationId: z.string() }))) })
			.parse(await (await fetch(`${server.origin}/api/v1/openapi.json`)).json());
		expect(api.openapi).toBe('3.1.0');
		for (const { path, method, id } of CALLS) expect(api.paths[path]?.[method]?.operationId).toBe(id);
	});
});

describe('GET /api/v1', () => {
	it('lists the calls on a page', async () => {
		const page = await (await fetch(`${server.origin}/api/v1`)).text();
		expect(page).toContain('POST /api/v1/studies/{study}/analyses');
	});
});
