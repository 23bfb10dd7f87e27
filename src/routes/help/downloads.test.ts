import { existsSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { projectRoot } from '#lib/server/folders.ts';
import { DOWNLOADS } from './downloads.ts';

describe('the downloads of the help page', () => {
	it('offers only files that are there', () => {
		const files = DOWNLOADS.flatMap((group) => group.files.map(({ file }) => file));
		expect(files.filter((file) => !existsSync(`${projectRoot()}/static/examples/${file}`))).toEqual([]);
		expect(files).toContain('lanternfrogs/summary-tree.nwk');
	});
});
