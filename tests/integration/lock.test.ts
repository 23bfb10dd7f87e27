import { existsSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { LockedError, takeLock } from '#lib/server/lock.ts';
import { runChild, type Child } from './support/runChild.ts';
import { temporaryFolder } from './support/temporaryFolder.ts';

let folder = '';
let remove = () => {};
const children: Child[] = [];
const hold = (command: string) => {
	const child = runChild('holdLock.ts', [folder, command]);
	children.push(child);
	return child;
};

beforeEach(() => ({ folder, remove } = temporaryFolder()));
afterEach(async () => {
	for (const child of children.splice(0)) {
		child.process.kill('SIGKILL');
		await child.ended;
	}
	remove();
});

describe('takeLock', () => {
	it('refuses a second process with the name of the holder and exit code 1', async () => {
		const first = hold('npm start');
		await first.says('holding');
		const second = hold('npm run demo');
		expect((await second.ended).code).toBe(1);
		expect(second.output()).toContain(`in use by npm start (process ${first.process.pid} on ${hostname()}, since 20`);
		expect(second.output()).toContain('Stop it first, or set KITHLINE_DATA to another folder.');
	});

	it('takes over the lock of a process that was killed', async () => {
		const first = hold('npm start');
		await first.says('holding');
		first.process.kill('SIGKILL');
		await first.ended;
		expect(existsSync(join(folder, 'lock.json'))).toBe(true);
		const lock = takeLock(folder, 'a test');
		lock.release();
	});

	it('is given back at the end of the process', async () => {
		const first = hold('npm start');
		await first.says('holding');
		first.process.kill('SIGTERM');
		await first.ended;
		expect(existsSync(join(folder, 'lock.json'))).toBe(false);
	});

	it('is taken by exactly one of many that find a stale one at the same time', async () => {
		const first = hold('npm start');
		await first.says('holding');
		first.process.kill('SIGKILL');
		await first.ended;
		const rivals = [1, 2, 3, 4].map((number) => hold(`rival ${number}`));
		const outcomes = await Promise.all(
			rivals.map((rival) => Promise.race([rival.says('holding').then(() => 'holds'), rival.ended.then(() => 'refused')]))
		);
		expect(outcomes.filter((outcome) => outcome === 'holds')).toHaveLength(1);
	});

	it('refuses the same process twice: two databases in one process harm each other as well', () => {
		const lock = takeLock(folder, 'first');
		expect(() => takeLock(folder, 'second')).toThrow(LockedError);
		lock.release();
		takeLock(folder, 'third').release();
	});

	it('leaves the lock of another machine alone and says what to delete', () => {
		const path = join(folder, 'lock.json');
		const elsewhere = {
			pid: 1,
			host: 'elsewhere',
			command: 'npm start',
			since: '2026-01-01T00:00:00Z',
			processStart: null,
			key: 'k'
		};
		writeFileSync(path, JSON.stringify(elsewhere));
		expect(() => takeLock(folder, 'a test')).toThrow(`when it is surely gone, delete ${path}`);
	});

	it('takes over when the pid belongs to a later process', () => {
		const path = join(folder, 'lock.json');
		const earlier = {
			pid: process.pid,
			host: hostname(),
			command: 'npm start',
			since: '2026-01-01T00:00:00Z',
			processStart: 'boot/1',
			key: 'k'
		};
		writeFileSync(path, JSON.stringify(earlier));
		takeLock(folder, 'a test').release();
		expect(existsSync(path)).toBe(false);
	});

	it('is readable by its owner alone', () => {
		const lock = takeLock(folder, 'a test');
		const path = join(folder, 'lock.json');
		expect(statSync(path).mode & 0o777).toBe(0o600);
		expect(JSON.parse(readFileSync(path, 'utf8'))).toMatchObject({ pid: process.pid, command: 'a test' });
		lock.release();
	});
});
