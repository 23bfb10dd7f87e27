import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openTestSite, type TestSite } from './support/openTestSite.ts';
import { Visitor } from './support/visitor.ts';

const PASSPHRASE = 'merrow oyster quill lantern';
let site: TestSite;
const visitor = () => new Visitor(site.origin);

async function signedIn(email: string, name = 'Ada Burnside'): Promise<Visitor> {
	const person = visitor();
	await person.post('/register', { name, email, passphrase: PASSPHRASE });
	await person.signIn(email, PASSPHRASE);
	return person;
}

beforeAll(async () => (site = await openTestSite()));
afterAll(() => site.close());

describe('registering', () => {
	it('makes an account with a lab of its own, and leads to sign-in', async () => {
		const person = visitor();
		const registered = await person.post('/register', { name: 'Ada Burnside', email: 'ada@lab.example', passphrase: PASSPHRASE });
		expect(registered).toMatchObject({ status: 303, to: '/sign-in?registered' });
		expect(await person.signIn('ADA@lab.example', PASSPHRASE)).toMatchObject({ status: 303, to: '/studies' });
		const account = await person.get('/account');
		expect(account.status).toBe(200);
		// The lab made at registration is named after the person; ' is written &#39; or ' in HTML.
		expect(account.text).toMatch(/Ada Burnside(&#39;|')s lab/);
	});

	it('carries the address, and where the person wanted to go, to the sign-in form, and not in the address bar', async () => {
		const person = visitor();
		const fields = { name: 'Cy', email: 'cy@lab.example', passphrase: PASSPHRASE };
		const registered = await person.post('/register?next=%2Flabs%2Fx', fields);
		expect(registered.to).toBe('/sign-in?registered&next=%2Flabs%2Fx');
		const form = await person.get('/sign-in?registered');
		expect(form.text).toContain('value="cy@lab.example"');
		expect((await person.signIn('cy@lab.example', PASSPHRASE)).status).toBe(303);
		expect(person.cookies.has('kithline-registered')).toBe(false);
	});

	it('answers the same for an address that has an account, and leaves that account alone', async () => {
		await signedIn('taken@lab.example');
		const again = await visitor().post('/register', {
			name: 'Eve',
			email: 'Taken@lab.example',
			passphrase: 'another long passphrase'
		});
		expect(again).toMatchObject({ status: 303, to: '/sign-in?registered' });
		expect((await visitor().signIn('taken@lab.example', 'another long passphrase')).status).toBe(400);
		expect((await visitor().signIn('taken@lab.example', PASSPHRASE)).status).toBe(303);
	});

	it('names the fault of a weak passphrase and shows again what was typed, but not the passphrase', async () => {
		const refused = await visitor().post('/register', { name: 'Bo', email: 'bo@lab.example', passphrase: 'tooshort-x' });
		expect(refused.status).toBe(400);
		expect(refused.text).toContain('at least 15 characters; this one has 10.');
		expect(refused.text).toContain('bo@lab.example');
		expect(refused.text).not.toContain('tooshort-x');
	});
});

describe('a session', () => {
	it('is needed for the account page, which leads to sign-in and back', async () => {
		const person = visitor();
		expect(await person.get('/account')).toMatchObject({ status: 303, to: '/sign-in?next=%2Faccount' });
		await person.post('/register', { name: 'Cy', email: 'cy@lab.example', passphrase: PASSPHRASE });
		expect(await person.signIn('cy@lab.example', PASSPHRASE, '/account')).toMatchObject({ status: 303, to: '/account' });
		expect(await visitor().signIn('cy@lab.example', PASSPHRASE, '//evil.example')).toMatchObject({ to: '/studies' });
	});

	it('rests on a cookie that scripts cannot read and other sites do not get', async () => {
		const person = visitor();
		await person.post('/register', { name: 'Di', email: 'di@lab.example', passphrase: PASSPHRASE });
		const line = (await person.signIn('di@lab.example', PASSPHRASE)).headers.getSetCookie().join('\n');
		expect(line).toMatch(/authjs\.session-token=[^;]+;.*HttpOnly/i);
		expect(line).toMatch(/SameSite=Lax/i);
	});

	it('ends at sign-out', async () => {
		const person = await signedIn('eli@lab.example');
		expect((await person.get('/account')).status).toBe(200);
		expect(await person.post('/sign-out', {})).toMatchObject({ status: 303, to: '/' });
		expect((await person.get('/account')).status).toBe(303);
	});

	it('ends everywhere at once when its person says so', async () => {
		const here = await signedIn('fay@lab.example');
		const there = visitor();
		await there.signIn('fay@lab.example', PASSPHRASE);
		await here.post('/account?/endSessions', {});
		expect((await there.get('/account')).status).toBe(303);
		expect((await here.get('/account')).status).toBe(303);
	});

	it('ends everywhere with a new passphrase, which takes the old one to set', async () => {
		const here = await signedIn('gus@lab.example');
		const there = visitor();
		await there.signIn('gus@lab.example', PASSPHRASE);
		const fresh = 'gravel thistle umber swan';
		const refused = await here.post('/account?/passphrase', { current: 'not the one', passphrase: fresh });
		expect(refused).toMatchObject({ status: 400 });
		expect(await here.post('/account?/passphrase', { current: PASSPHRASE, passphrase: fresh })).toMatchObject({
			to: '/sign-in?changed'
		});
		expect((await there.get('/account')).status).toBe(303);
		expect((await visitor().signIn('gus@lab.example', PASSPHRASE)).status).toBe(400);
		expect((await visitor().signIn('gus@lab.example', fresh)).status).toBe(303);
	});

	it('cannot be had by posting to the session library directly', async () => {
		await signedIn('hal@lab.example');
		const person = visitor();
		await person.post('/auth/callback/credentials', { email: 'hal@lab.example', passphrase: PASSPHRASE, ticket: 'guess' });
		expect((await person.get('/account')).status).toBe(303);
	});
});

describe('a wrong passphrase', () => {
	it('gets the same words as an unknown address', async () => {
		await signedIn('ida@lab.example');
		const wrong = await visitor().signIn('ida@lab.example', 'wrong wrong wrong wrong');
		const unknown = await visitor().signIn('nobody@lab.example', 'wrong wrong wrong wrong');
		const words = 'Address and passphrase do not go together.';
		expect(wrong.text).toContain(words);
		expect(unknown.text).toContain(words);
		expect([wrong.status, unknown.status]).toEqual([400, 400]);
	});

	// Five free attempts, then a wait: the rule in rateLimit.ts.
	it('brings a wait after five, also before the right one, and says how long', async () => {
		await signedIn('jo@lab.example');
		for (let attempt = 0; attempt < 5; attempt += 1) {
			expect((await visitor().signIn('jo@lab.example', 'wrong wrong wrong wrong')).status).toBe(400);
		}
		const sixth = await visitor().signIn('jo@lab.example', PASSPHRASE);
		expect(sixth.status).toBe(429);
		expect(sixth.text).toMatch(/Try again in [12] seconds?\./);
	});
});

describe('a token', () => {
	it('is shown once, opens the way without a cookie, and is refused after it is revoked', async () => {
		const person = await signedIn('kay@lab.example');
		const made = await person.post('/account?/makeToken', { label: 'my scripts' });
		const token = /kithline_[\w-]{43}/.exec(made.text)?.[0] ?? '';
		expect(token).not.toBe('');
		expect((await person.get('/account')).text).not.toContain(token);
		const bearer = { authorization: `Bearer ${token}` };
		expect((await visitor().get('/account', bearer)).status).toBe(200);
		const id = /name="token" value="([^"]+)"/.exec((await person.get('/account')).text)?.[1] ?? '';
		expect((await person.post('/account?/revokeToken', { token: id })).status).toBe(200);
		expect((await visitor().get('/account', bearer)).status).toBe(303);
	});

	it('that is wrong is not made good by a cookie beside it', async () => {
		const person = await signedIn('lou@lab.example');
		expect((await person.get('/account', { authorization: 'Bearer nonsense' })).status).toBe(303);
	});

	it('of somebody else cannot be revoked', async () => {
		const owner = await signedIn('mia@lab.example');
		await owner.post('/account?/makeToken', { label: 'hers' });
		const id = /name="token" value="([^"]+)"/.exec((await owner.get('/account')).text)?.[1] ?? '';
		const other = await signedIn('ned@lab.example');
		expect((await other.post('/account?/revokeToken', { token: id })).status).toBe(400);
		expect((await owner.get('/account')).text).toContain(id);
	});
});

describe('a request from another site', () => {
	it('is refused with a sentence and changes nothing', async () => {
		const person = await signedIn('ola@lab.example', 'Ola Fell');
		const foreign = await person.post('/account?/rename', { name: 'Mallory' }, 'https://evil.example');
		expect(foreign.status).toBe(403);
		expect(foreign.text).toContain('came from another site');
		expect((await person.post('/account?/rename', { name: 'Mallory' }, null)).status).toBe(403);
		expect((await person.get('/account')).text).not.toContain('Mallory');
	});
});

describe('the headers of a private page', () => {
	it('keep it out of caches, frames and guesses', async () => {
		const { headers } = await (await signedIn('pam@lab.example')).get('/account');
		expect(headers.get('cache-control')).toContain('no-store');
		expect(headers.get('x-content-type-options')).toBe('nosniff');
		expect(headers.get('content-security-policy')).toContain("frame-ancestors 'none'");
		expect(headers.get('referrer-policy')).not.toBeNull();
		// Plain http on loopback: a promise of https would lock the person out.
		expect(headers.get('strict-transport-security')).toBeNull();
	});
});

describe('/health', () => {
	it('says that database and queue answer, and tells no secret', async () => {
		const { status, text } = await visitor().get('/health');
		expect(status).toBe(200);
		expect(Object.keys(JSON.parse(text)).sort()).toEqual(['database', 'queue', 'status', 'version']);
	});
});
