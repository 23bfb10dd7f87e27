import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** A new data folder of its own for one test, and the way to get rid of it. */
export function temporaryFolder(): { folder: string; remove: () => void } {
	const folder = mkdtempSync(join(tmpdir(), 'kithline-test-'));
	return { folder, remove: () => rmSync(folder, { recursive: true, force: true }) };
}
