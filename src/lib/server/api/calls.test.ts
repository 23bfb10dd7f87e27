import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { describe, expect, it } from 'vitest';
import { projectRoot } from '#lib/server/folders.ts';
import { CALLS } from './calls.ts';
import { describeApi } from './describeApi.ts';

const folder = join(projectRoot(), 'src/routes/api/v1');

/** `studies/[study]/+server.ts` with GET and POST → "get /studies/{study}", "post /studies/{study}" */
function routes(): string[] {
	const files = readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((file) => file.endsWith('+server.ts'));
	return files.flatMap((file) => {
		const path = `/${relative('.', join(file, '..'))}`.replaceAll(/\[(\w+)\]/g, '{$1}');
		const methods = [...readFileSync(join(folder, file), 'utf8').matchAll(/export const (GET|POST|PUT|PATCH|DELETE):/g)];
		return methods.map(([, method = '']) => `${method.toLowerCase()} ${path}`);
	});
}

describe('CALLS', () => {
	it('lists exactly the routes that are there', () => {
		expect(CALLS.map(({ method, path }) => `${method} ${path}`).sort()).toEqual(routes().sort());
	});

	it('gives every call a name of its own', () => {
		expect(new Set(CALLS.map(({ id }) => id)).size).toBe(CALLS.length);
	});
});

describe('describeApi', () => {
	const text = JSON.stringify(describeApi('https://kithline.example'));

	it('describes bodies from the schemas that check them', () => {
		// from the plan's schema: a limit and a default that the page and the API share
		expect(text).toContain('"permutations":{"default":9999,"type":"integer","minimum":1,"maximum":1000000}');
		expect(text).toContain('"servers":[{"url":"https://kithline.example/api/v1"}]');
	});

	it('names every parameter of a path', () => {
		for (const { path } of CALLS) {
			for (const [, name] of path.matchAll(/\{(\w+)\}/g)) expect(text).toContain(`"name":"${name}","in":"path"`);
		}
	});
});
