import { describe, expect, it } from 'vitest';
import { EnvironmentError, readEnvironment } from './env.ts';

describe('readEnvironment', () => {
	// The defaults of the table of variables in the design.
	it('needs no variable at all', () => {
		const environment = readEnvironment({});
		expect(environment).toMatchObject({ port: 3000, host: '127.0.0.1', isLoopback: true, origin: null, databaseUrl: null });
		expect(environment.dataFolder.endsWith('/data')).toBe(true);
		expect(environment.workers).toBeGreaterThanOrEqual(1);
		expect(environment.workers).toBeLessThanOrEqual(8);
	});

	it('treats an empty variable as absent', () => {
		expect(readEnvironment({ PORT: '', ORIGIN: '' })).toMatchObject({ port: 3000, origin: null });
	});

	it.each([
		[{ PORT: 'abc' }, 'PORT must be a number; got "abc".'],
		[{ PORT: '70000' }, 'PORT must be at most 65535; got "70000".'],
		[{ KITHLINE_WORKERS: '0' }, 'KITHLINE_WORKERS must be at least 1; got "0".'],
		[{ ORIGIN: 'kithline' }, 'ORIGIN must be an address such as https://kithline.example.org; got "kithline".'],
		[
			{ OIDC_ISSUER: 'https://orcid.org' },
			'OIDC_ISSUER, OIDC_CLIENT_ID and OIDC_CLIENT_SECRET must be set together, or none of them.'
		]
	])('names the variable that is wrong: %o', (variables, sentence) => {
		expect(() => readEnvironment(variables)).toThrow(new EnvironmentError(sentence));
	});

	it('never repeats a secret', () => {
		expect(() => readEnvironment({ AUTH_SECRET: 'tooshort' })).toThrow(
			/^(?!.*tooshort).*AUTH_SECRET must have at least 32 characters/
		);
		expect(() => readEnvironment({ DATABASE_URL: 'mysql://u:hush@h/d' })).toThrow(/^(?!.*hush).*DATABASE_URL must be an address/);
	});

	it('requires the public address beyond loopback', () => {
		expect(() => readEnvironment({ HOST: '0.0.0.0' })).toThrow('ORIGIN must be set to the public address');
		expect(readEnvironment({ HOST: '0.0.0.0', ORIGIN: 'https://lab.example/' }).origin).toBe('https://lab.example');
	});
});
