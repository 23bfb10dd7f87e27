import { request } from 'node:http';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { LARGE_BODY_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { can } from '#lib/server/permissions.ts';
import * as studies from '#lib/server/repositories/studies.ts';
import { startApiServer, type ApiServer } from './api/apiServer.ts';
import { Visitor } from './support/visitor.ts';

let server: ApiServer;
let study: string;
let visitor: Visitor;

beforeAll(async () => {
	server = await startApiServer();
	const { lead, lab } = server.people;
	study = (await studies.create(await can(lead.user, 'create', { lab }), { title: 'Large texts' })).id;
	visitor = new Visitor(server.origin);
	await visitor.signIn(lead.email, lead.passphrase);
});
afterAll(() => server.stop());

type Announced = { readonly bytes: number | null; readonly headers: Record<string, string> };

/** Sends the head of a request and not one byte of its body: who answers has not read it. */
function announce(path: string, { bytes, headers }: Announced): Promise<{ status: number; text: string }> {
	return new Promise((answered, failed) => {
		const length = bytes === null ? {} : { 'content-length': String(bytes) };
		const asked = request(server.origin + path, { method: 'POST', headers: { ...headers, ...length } });
		asked.on('error', failed);
		asked.on('response', (response) => {
			let text = '';
			response.on('data', (part: Buffer) => (text += part.toString()));
			response.on('end', () => {
				asked.destroy();
				answered({ status: response.statusCode ?? 0, text });
			});
		});
		asked.flushHeaders();
	});
}

const onPage = () => ({
	origin: server.origin,
	cookie: [...visitor.cookies].map(([name, value]) => `${name}=${value}`).join('; '),
	'content-type': 'multipart/form-data; boundary=edge',
	accept: 'text/html'
});
const byScript = () => ({ authorization: `Bearer ${server.people.lead.token}`, 'content-type': 'application/json' });

// The limit is 192 MiB: a matrix of 96 MiB as JSON or in UTF-16. The sentence has the limit and what was announced.
describe('a body that announces more than any text may have', () => {
	const TOO_LARGE = LARGE_BODY_LIMIT_BYTES + 1024 * 1024;

	it.each(['tree-sets', 'overlap-runs'])('is refused by the API at its head, as %s', async (kind) => {
		const { status, text } = await announce(`/api/v1/studies/${study}/${kind}`, { bytes: TOO_LARGE, headers: byScript() });
		expect(status).toBe(413);
		expect(JSON.parse(text)).toMatchObject({ code: 'body-too-large' });
		expect(text).toMatch(/at most 192 MiB .*193 MiB .* were announced/);
	});

	it.each(['look', 'keep'])('is refused by the page at its head, to %s', async (act) => {
		const path = `/studies/${study}/materials?/${act}`;
		const { status, text } = await announce(path, { bytes: TOO_LARGE, headers: onPage() });
		expect(status).toBe(413);
		expect(text).toMatch(/Expected a text of at most 192 MiB [^<]*; this is 193 MiB/);
	});

	it('is refused by the page when it does not say its size', async () => {
		const headers = { ...onPage(), 'transfer-encoding': 'chunked' };
		const { status, text } = await announce(`/studies/${study}/materials?/look`, { bytes: null, headers });
		expect(status).toBe(413);
		expect(text).toContain('its size was not announced');
	});
});
