import { execFile } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

const run = promisify(execFile);

/**
 * One planted violation per rule, in a copy of the house: each file is written into the room it offends, and the tool must
 * name the rule.
 */
const violations: Record<string, { file: string; text: string }> = {
	'remarks-alone': { file: 'src/lib/remarks/planted.ts', text: "export * from '#lib/phylogeny/tree.ts';" },
	'phylogeny-alone': { file: 'src/lib/phylogeny/planted.ts', text: "export * from '#lib/overlap/pairMatrix.ts';" },
	'overlap-alone': { file: 'src/lib/overlap/planted.ts', text: "export * from '#lib/phylogeny/tree.ts';" },
	'statistics-of-sciences': { file: 'src/lib/statistics/planted.ts', text: "export * from '#lib/contracts/plan.ts';" },
	'analysis-composes': { file: 'src/lib/analysis/planted.ts', text: "export * from '#lib/server/env.ts';" },
	'contracts-are-shapes': { file: 'src/lib/contracts/planted.ts', text: "export * from '#lib/analysis/analyse.ts';" },
	'figures-draw': { file: 'src/lib/figures/planted.ts', text: "export * from '#lib/analysis/analyse.ts';" },
	'components-know-no-science': { file: 'src/lib/components/planted.ts', text: "export * from '#lib/phylogeny/tree.ts';" },
	'server-serves': { file: 'src/lib/server/planted.ts', text: "export * from '#lib/components/whenText.ts';" },
	'kernel-alone': { file: 'src/kernel/planted.ts', text: "export * from '#lib/phylogeny/tree.ts';" },
	'worker-is-a-shell': { file: 'src/worker/planted.ts', text: "export * from '#lib/phylogeny/tree.ts';" },
	'packages-of-the-sciences': { file: 'src/lib/phylogeny/plantedPackage.ts', text: "export * from 'zod';" },
	'sciences-without-node': { file: 'src/lib/analysis/plantedNode.ts', text: "export * from 'node:fs';" },
	'sql-in-its-place': { file: 'src/lib/server/plantedSql.ts', text: "export * from 'drizzle-orm';" },
	'server-only-from-server-files': { file: 'src/lib/figures/plantedServer.ts', text: "export * from '#lib/server/env.ts';" },
	'no-tests-in-the-product': { file: 'src/lib/statistics/plantedTest.ts', text: "export * from './plantedTarget.test.ts';" },
	'no-unresolved': { file: 'src/lib/statistics/plantedNowhere.ts', text: "export * from './nowhere.ts';" },
	'no-cycles': {
		file: 'src/lib/statistics/plantedLoop.ts',
		text: "import { b } from './plantedLoopBack.ts';\nexport const a = () => b;"
	}
};
const companions = [
	{ file: 'src/lib/statistics/plantedLoopBack.ts', text: "import { a } from './plantedLoop.ts';\nexport const b = () => a;" },
	{ file: 'src/lib/statistics/plantedTarget.test.ts', text: 'export const target = 1;' }
];
const planted = [...Object.values(violations), ...companions];
const root = process.cwd();

/** A copy of src with the violations in it; packages and generated types are shared by link. */
function plantedHouse(): string {
	const house = mkdtempSync(join(tmpdir(), 'kithline-planted-'));
	cpSync(join(root, 'src'), join(house, 'src'), { recursive: true });
	for (const name of ['package.json', 'tsconfig.json', '.dependency-cruiser.cjs']) cpSync(join(root, name), join(house, name));
	for (const name of ['node_modules', '.svelte-kit']) symlinkSync(join(root, name), join(house, name));
	for (const { file, text } of planted) {
		mkdirSync(dirname(join(house, file)), { recursive: true });
		writeFileSync(join(house, file), `${text}\n`);
	}
	return house;
}

describe('the import rules', () => {
	let broken: { rule: string; from: string }[] = [];

	let house = '';
	beforeAll(async () => {
		house = plantedHouse();
		const rules = ['--config', '.dependency-cruiser.cjs', '--output-type', 'json', 'src'];
		const { stdout } = await run(join(root, 'node_modules/.bin/depcruise'), rules, { cwd: house, maxBuffer: 1 << 28 }).catch(
			(failure: { stdout: string }) => failure
		);
		broken = JSON.parse(stdout).summary.violations.map((violation: { rule: { name: string }; from: string }) => ({
			rule: violation.rule.name,
			from: violation.from
		}));
	}, 120_000);

	afterAll(() => rmSync(house, { recursive: true, force: true }));

	it.each(Object.entries(violations))('%s objects to its planted violation', (rule, { file }) => {
		expect(broken).toContainEqual({ rule, from: file });
	});

	it('has a planted violation for every rule it holds', async () => {
		const { default: config } = await import('../../.dependency-cruiser.cjs');
		expect(config.forbidden.map(({ name }: { name: string }) => name).sort()).toEqual(Object.keys(violations).sort());
	});
});
