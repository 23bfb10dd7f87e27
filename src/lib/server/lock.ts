import { linkSync, mkdirSync, readFileSync, readdirSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { randomUUID } from 'node:crypto';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { z } from 'zod';

/**
 * The embedded database has no lock of its own: two processes on one folder lose data without an error.
 * So whoever opens a data folder first takes this lock, a file created exclusively that names its holder.
 */
const LOCK_FILE = 'lock.json';
/** begins the names of locks that are being moved out of the way */
const ASIDE = 'lock-stale-';
/** far longer than moving a file takes */
const SETTLE_MS = 100;

const holderSchema = z.object({
	pid: z.number().int().positive(),
	host: z.string(),
	command: z.string(),
	since: z.string(),
	/** tells one run of a process from another; also guards against a pid that was given out again */
	processStart: z.string().nullable(),
	/** tells this hold from any other */
	key: z.string()
});
type Holder = z.infer<typeof holderSchema>;

export type Lock = { readonly folder: string; readonly release: () => void };

/** Somebody else has the data folder open. The message names the holder. */
export class LockedError extends Error {
	override readonly name = 'LockedError';
}

/**
 * Takes the data folder for this process until `release` or the end of the process. A lock whose process is gone
 * (also after `kill -9`) is taken over.
 *
 * @throws {LockedError} when a living process holds the folder; a lock from another host counts as held, because its
 * process cannot be looked up from here
 */
export function takeLock(folder: string, command: string): Lock {
	mkdirSync(folder, { recursive: true, mode: 0o700 });
	const path = join(folder, LOCK_FILE);
	const mine: Holder = {
		pid: process.pid,
		host: hostname(),
		command,
		since: new Date().toISOString(),
		processStart: processStart(process.pid),
		key: randomUUID()
	};
	if (!create(path, mine)) {
		const holder = readHolder(path);
		if (holder !== null && isAlive(holder)) throw new LockedError(sentence(folder, holder));
		takeOver(path, holder, folder);
		if (!create(path, mine)) throw new LockedError(sentence(folder, readHolder(path)));
	}
	confirm(path, folder, mine);
	return held(path, folder, mine);
}

function held(path: string, folder: string, mine: Holder): Lock {
	const release = () => {
		process.off('exit', release);
		if (readHolder(path)?.key === mine.key) rmSync(path, { force: true });
	};
	process.on('exit', release);
	return { folder, release };
}

/** A link appears whole or not at all, so no reader ever meets a lock without its holder's name. */
function create(path: string, holder: Holder): boolean {
	const draft = `${path}.${holder.key}`;
	writeFileSync(draft, JSON.stringify(holder), { mode: 0o600 });
	try {
		linkSync(draft, path);
		return true;
	} catch (cause) {
		if (cause instanceof Error && 'code' in cause && cause.code === 'EEXIST') return false;
		throw cause;
	} finally {
		rmSync(draft, { force: true });
	}
}

/**
 * Moves a stale lock aside. Two processes may do so at once, and the slower one could move the lock that the faster
 * one has just taken: so what was moved is read again, and put back when it is not the stale one.
 */
function takeOver(path: string, stale: Holder | null, folder: string): void {
	const aside = join(folder, `${ASIDE}${randomUUID()}.json`);
	try {
		renameSync(path, aside);
	} catch {
		return;
	}
	const moved = readHolder(aside);
	if (moved !== null && moved.key !== stale?.key && isAlive(moved)) {
		renameSync(aside, path);
		throw new LockedError(sentence(folder, moved));
	}
	rmSync(aside, { force: true });
}

/** While somebody else moves a lock aside, a third could slip in and be overwritten when it is put back: so look again. */
function confirm(path: string, folder: string, mine: Holder): void {
	if (!readdirSync(folder).some((name) => name.startsWith(ASIDE))) return;
	Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, SETTLE_MS);
	const holder = readHolder(path);
	if (holder?.key !== mine.key) throw new LockedError(sentence(folder, holder));
}

/** Null when there is no lock, or it cannot be read. */
function readHolder(path: string): Holder | null {
	try {
		return holderSchema.parse(JSON.parse(readFileSync(path, 'utf8')));
	} catch {
		return null;
	}
}

function isAlive(holder: Holder): boolean {
	if (holder.host !== hostname()) return true;
	try {
		process.kill(holder.pid, 0);
	} catch (cause) {
		return cause instanceof Error && 'code' in cause && cause.code === 'EPERM';
	}
	const now = processStart(holder.pid);
	return now !== ENDED && (holder.processStart === null || now === null || now === holder.processStart);
}

/** a process that has ended but whose parent has not yet asked for its exit code */
const ENDED = 'ended';

/** Ticks after boot at which the process started, with the boot's own identity; null where /proc is not there. */
function processStart(pid: number): string | null {
	try {
		const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
		// The command name in brackets may hold blanks; the 22nd field is the 20th after the closing bracket.
		const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
		const ticks = fields[19];
		if (fields[0] === 'Z' || fields[0] === 'X') return ENDED;
		const boot = readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim();
		return ticks === undefined ? null : `${boot}/${ticks}`;
	} catch {
		return null;
	}
}

function sentence(folder: string, holder: Holder | null): string {
	const who =
		holder === null ? 'another process' : `${holder.command} (process ${holder.pid} on ${holder.host}, since ${holder.since})`;
	const advice =
		holder === null || holder.host === hostname()
			? 'Stop it first, or set KITHLINE_DATA to another folder.'
			: `That process cannot be seen from ${hostname()}: when it is surely gone, delete ${join(folder, LOCK_FILE)}.`;
	return `The data folder ${folder} is in use by ${who}. ${advice}`;
}
