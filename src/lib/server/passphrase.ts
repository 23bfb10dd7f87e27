import { hash, verify, type Options } from '@node-rs/argon2';
import { randomInt } from 'node:crypto';
import { COMMON_PASSPHRASES } from './commonPassphrases.ts';

/** The only factor, so long rather than complicated; no rules about kinds of characters. */
export const SHORTEST = 15;
export const LONGEST = 128;

/** Argon2id with 19 MiB, two passes, one lane: the minimum of the OWASP Password Storage cheat sheet. 40 to 90 ms. */
const COST: Options = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** Too short to tell anything about a person when they stand inside a passphrase. */
const SHORTEST_CONTEXT_WORD = 4;

/**
 * What is wrong with a new passphrase, as a sentence; null when it may be used. Characters are counted as people see
 * them and compared exactly: nothing is cut, trimmed or folded when it is stored.
 *
 * @param context - words an attacker would try first: name, e-mail, lab
 */
export function passphraseFault(passphrase: string, context: readonly string[]): string | null {
	const length = [...passphrase].length;
	if (length < SHORTEST) {
		return `A passphrase needs at least ${SHORTEST} characters; this one has ${length}. Four or five unrelated words make a good one.`;
	}
	if (length > LONGEST) return `A passphrase may have at most ${LONGEST} characters; this one has ${length}.`;
	const plain = passphrase.toLowerCase();
	if (new Set(plain).size < 5 || COMMON_PASSPHRASES.has(onlyLetters(plain))) {
		return 'This passphrase is among the first that anybody would try. Choose unrelated words of your own.';
	}
	const word = contextWords(context).find((candidate) => leavesTooLittle(plain, candidate));
	if (word !== undefined)
		return `This passphrase is mostly "${word}", which is easy to guess here. Choose words that have nothing to do with you or this site.`;
	return null;
}

export function hashPassphrase(passphrase: string): Promise<string> {
	return hash(passphrase, COST);
}

/** Takes as long for an unknown account (`null`) as for a known one, so that time tells nobody who has one. */
export async function verifyPassphrase(kept: string | null, passphrase: string): Promise<boolean> {
	// Longer than any that can be set: not worth hashing, and never right.
	if (passphrase.length > 4 * LONGEST) return false;
	const isRight = await verify(kept ?? (await someHash()), passphrase);
	return isRight && kept !== null;
}

let unknownHash: Promise<string> | null = null;

function someHash(): Promise<string> {
	unknownHash ??= hashPassphrase('nobody has this one');
	return unknownHash;
}

const SYLLABLES = ['ba', 'do', 'fi', 'gu', 'ka', 'le', 'mo', 'ni', 'pa', 'ro', 'su', 'ta', 've', 'wi', 'zo', 'he'];

/** Five invented words of three syllables each: 16^15 = 2^60 possibilities, easy to read out. */
export function randomPassphrase(): string {
	const syllable = () => SYLLABLES[randomInt(SYLLABLES.length)] ?? 'ba';
	const word = () => syllable() + syllable() + syllable();
	return [word(), word(), word(), word(), word()].join(' ');
}

function onlyLetters(text: string): string {
	return text.replace(/[^\p{L}\p{N}]/gu, '');
}

function contextWords(context: readonly string[]): string[] {
	const words = ['kithline', ...context].flatMap((text) => text.toLowerCase().split(/[^\p{L}\p{N}]+/u));
	return words.filter((word) => word.length >= SHORTEST_CONTEXT_WORD);
}

/** A name inside a long passphrase is harmless; a passphrase that is little else is not. */
function leavesTooLittle(passphrase: string, word: string): boolean {
	return (
		passphrase.includes(word) && [...onlyLetters(passphrase.replaceAll(word, ''))].length < SHORTEST - SHORTEST_CONTEXT_WORD - 3
	);
}
