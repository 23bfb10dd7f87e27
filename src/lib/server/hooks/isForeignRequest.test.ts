import { describe, expect, it } from 'vitest';
import { isForeignRequest } from './isForeignRequest.ts';

const SITE = 'https://lab.example';
const request = (method: string, headers: Record<string, string> = {}) => new Request(`${SITE}/studies`, { method, headers });

describe('isForeignRequest', () => {
	it.each(['GET', 'HEAD', 'OPTIONS'])('lets %s pass from anywhere: it changes nothing', (method) => {
		expect(isForeignRequest(request(method, { origin: 'https://evil.example', cookie: 'a=b' }), SITE, false)).toBe(false);
	});

	it.each(['POST', 'PUT', 'PATCH', 'DELETE'])('refuses %s from another origin', (method) => {
		expect(isForeignRequest(request(method, { origin: 'https://evil.example' }), SITE, false)).toBe(true);
		expect(isForeignRequest(request(method, { origin: 'http://lab.example' }), SITE, false)).toBe(true);
		expect(isForeignRequest(request(method, { origin: 'null' }), SITE, false)).toBe(true);
		expect(isForeignRequest(request(method, { origin: SITE }), SITE, false)).toBe(false);
	});

	it('exempts a request with a token, whatever its origin', () => {
		expect(isForeignRequest(request('POST', { origin: 'https://evil.example', cookie: 'a=b' }), SITE, true)).toBe(false);
	});

	it('refuses a cookie request that does not say where it comes from', () => {
		expect(isForeignRequest(request('POST', { cookie: 'a=b' }), SITE, false)).toBe(true);
		expect(isForeignRequest(request('POST', { cookie: 'a=b', 'sec-fetch-site': 'cross-site' }), SITE, false)).toBe(true);
		expect(isForeignRequest(request('POST', { cookie: 'a=b', 'sec-fetch-site': 'same-origin' }), SITE, false)).toBe(false);
	});

	it('lets a script without cookie and token through, to ask for its first token', () => {
		expect(isForeignRequest(request('POST'), SITE, false)).toBe(false);
	});
});
