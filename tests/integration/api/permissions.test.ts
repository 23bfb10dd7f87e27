import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { reportAnswerSchema } from '#lib/contracts/answers.ts';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, CSV, makeStudy, runAnalysis, TREE, type Ran } from './materials.ts';

type Role = 'reader' | 'analyst';
type Row = {
	readonly method: 'GET' | 'POST' | 'PUT';
	readonly path: (ran: Ran) => string;
	readonly body?: (ran: Ran) => object;
	readonly lowest: Role;
};

/** Every call on something that lies in a lab, with the lowest role that may: design, section 2. */
const ROWS: Readonly<Record<string, Row>> = {
	'a study': { method: 'GET', path: ({ study }) => `/studies/${study}`, lowest: 'reader' },
	'new tree set': {
		method: 'POST',
		path: ({ study }) => `/studies/${study}/tree-sets`,
		body: () => ({ label: 'T', text: TREE }),
		lowest: 'analyst'
	},
	'new overlap run': {
		method: 'POST',
		path: ({ study }) => `/studies/${study}/overlap-runs`,
		body: () => ({ label: 'O', measure: 'other', csv: CSV }),
		lowest: 'analyst'
	},
	'new covariate': {
		method: 'POST',
		path: ({ study }) => `/studies/${study}/covariates`,
		body: () => ({ label: 'C', csv: CSV }),
		lowest: 'analyst'
	},
	names: { method: 'GET', path: ({ study }) => `/studies/${study}/names`, lowest: 'reader' },
	'decide names': {
		method: 'PUT',
		path: ({ study }) => `/studies/${study}/names`,
		body: () => ({ decisions: [] }),
		lowest: 'analyst'
	},
	'new analysis': {
		method: 'POST',
		path: ({ study }) => `/studies/${study}/analyses`,
		body: ({ treeSet, overlapRun }) => ({ treeSet, overlapRun, seed: 7 }),
		lowest: 'analyst'
	},
	'a tree set': { method: 'GET', path: ({ treeSet }) => `/tree-sets/${treeSet}`, lowest: 'reader' },
	'MRCA ages': { method: 'GET', path: ({ treeSet }) => `/tree-sets/${treeSet}/mrca-ages`, lowest: 'reader' },
	'an overlap run': { method: 'GET', path: ({ overlapRun }) => `/overlap-runs/${overlapRun}`, lowest: 'reader' },
	'an analysis': { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}`, lowest: 'reader' },
	'stop an analysis': { method: 'POST', path: ({ analysis }) => `/analyses/${analysis}/stop`, lowest: 'analyst' },
	events: { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}/events`, lowest: 'reader' },
	'plate.svg': { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}/plate.svg`, lowest: 'reader' },
	'plate.pdf': { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}/plate.pdf`, lowest: 'reader' },
	'plate.png': { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}/plate.png?dpi=72`, lowest: 'reader' },
	'pairs.csv': { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}/pairs.csv`, lowest: 'reader' },
	'nodes.csv': { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}/nodes.csv`, lowest: 'reader' },
	'clades.csv': { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}/clades.csv`, lowest: 'reader' },
	'new report': {
		method: 'POST',
		path: ({ analysis }) => `/analyses/${analysis}/reports`,
		body: () => ({ title: 'R' }),
		lowest: 'analyst'
	},
	'report.pdf': { method: 'GET', path: ({ analysis }) => `/analyses/${analysis}/report.pdf`, lowest: 'reader' }
};

const rows = Object.entries(ROWS);
let server: ApiServer;
let ran: Ran;
let clients: Readonly<Record<'lead' | 'analyst' | 'reader' | 'stranger' | 'nobody', Client>>;

beforeAll(async () => {
	server = await startApiServer();
	const { lead, analyst, reader, stranger, lab } = server.people;
	const of = (person: typeof lead | null) => clientOf(server.origin, person);
	clients = { lead: of(lead), analyst: of(analyst), reader: of(reader), stranger: of(stranger), nobody: of(null) };
	ran = await runAnalysis(clients.lead, await bringMaterials(clients.lead, await makeStudy(clients.lead, lab)), { seed: 7 });
	await clients.lead.post(`/analyses/${ran.analysis}/reports`, { title: 'Saved' }, reportAnswerSchema);
});
afterAll(() => server.stop());

const sentBy = ({ method, body }: Row) => ({ method, ...(body === undefined ? {} : { body: body(ran) }) });

describe('every call', () => {
	it.each(rows)('is a 401 problem without a token: %s', async (_, row) => {
		expect(await clients.nobody.refusal(row.path(ran), sentBy(row))).toMatchObject({ status: 401 });
	});

	it.each(rows)('is a 404 problem for somebody of another lab: %s', async (_, row) => {
		expect(await clients.stranger.refusal(row.path(ran), sentBy(row))).toMatchObject({ status: 404 });
	});

	it.each(rows)('is a 404 problem for an id that is nothing, whatever its letters: %s', async (_, row) => {
		for (const id of ['nothing-here', '%00', "'; drop table users;--"]) {
			const path = row.path({ study: id, treeSet: id, overlapRun: id, analysis: id });
			expect(await clients.lead.refusal(path, sentBy(row)), id).toMatchObject({ status: 404 });
		}
	});

	it.each(rows)('follows the role: %s', async (_, row) => {
		const asReader = await clients.reader.fetch(row.path(ran), sentBy(row));
		const asAnalyst = await clients.analyst.fetch(row.path(ran), sentBy(row));
		await Promise.all([asReader.body?.cancel(), asAnalyst.body?.cancel()]);
		expect(asReader.status === 403).toBe(row.lowest === 'analyst');
		expect(asReader.status).toBeLessThan(row.lowest === 'analyst' ? 404 : 300);
		expect(asAnalyst.status).toBeLessThan(300);
	});
});

describe('a study of another lab', () => {
	it('cannot be filled by naming the lab', async () => {
		const body = { title: 'Mine now', lab: server.people.lab };
		expect(await clients.stranger.refusal('/studies', { body })).toMatchObject({ status: 404 });
		expect(await clients.reader.refusal('/studies', { body })).toMatchObject({ status: 403 });
	});

	it('lends no material to a plan', async () => {
		const own = await bringMaterials(clients.stranger, await makeStudy(clients.stranger));
		const plans = [
			{ treeSet: ran.treeSet, overlapRun: own.overlapRun },
			{ treeSet: own.treeSet, overlapRun: ran.overlapRun }
		];
		for (const body of plans) {
			const problem = await clients.stranger.refusal(`/studies/${own.study}/analyses`, { body });
			expect(problem).toMatchObject({ status: 404, code: 'not-found' });
		}
	});
});
