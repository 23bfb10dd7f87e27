import { InputError } from '#lib/remarks/inputError.ts';
import { placeAt, placeInWords } from './placeAt.ts';

/** Kinds of token: a mark is its own character code, so that one comparison serves for both. */
export const END = 0;
export const WORD = 1;
export const QUOTED = 2;
export const OPEN = 40;
export const CLOSE = 41;
export const COMMA = 44;
export const COLON = 58;
export const SEMICOLON = 59;

const LAST_BLANK = 32; // blank, tab, line ends and the other control characters
const DOUBLE_QUOTE = 34;
const SINGLE_QUOTE = 39;
const LEFT_SQUARE = 91;
const RIGHT_SQUARE = 93;
const AMPERSAND = 38;

/** 1 for every character that ends an unquoted word; all of them lie below `PAST_LAST_END`. */
const PAST_LAST_END = RIGHT_SQUARE + 1;
const ENDS_WORD = new Uint8Array(PAST_LAST_END).fill(1, 0, LAST_BLANK + 1);
for (const code of [SINGLE_QUOTE, OPEN, CLOSE, COMMA, COLON, SEMICOLON, LEFT_SQUARE, RIGHT_SQUARE]) ENDS_WORD[code] = 1;

/** A comment that starts with `[&`, without its brackets and its `&`; on the branch when it stands after the colon. */
export type MetaComment = { readonly body: string; readonly isOnBranch: boolean };

/**
 * Cuts a tree text into words, quoted labels and marks. Comments are skipped, nested ones too; those that start with `&`
 * wait in `metaComments` until the caller takes them. Nothing is copied: a word is `start` to `end` of `text`.
 */
export class Scanner {
	readonly text: string;
	/** offset of the next unread character */
	at: number;
	/** the last token is text.slice(start, end), quotes included */
	start = 0;
	end = 0;
	metaComments: MetaComment[] = [];
	private lastMark = END;

	constructor(text: string, at = 0) {
		this.text = text;
		this.at = at;
	}

	/** Reads one token and says its kind. */
	next(): number {
		const text = this.text;
		const length = text.length;
		let at = this.at;
		while (at < length) {
			const code = text.charCodeAt(at);
			if (code <= LAST_BLANK) {
				at += 1;
			} else if (code === LEFT_SQUARE) {
				at = this.skipComment(at);
			} else {
				this.start = at;
				return code < PAST_LAST_END && (ENDS_WORD[code] === 1 || code === DOUBLE_QUOTE) ? this.mark(code) : this.word(at);
			}
		}
		this.start = this.end = this.at = length;
		return END;
	}

	/** The last token as it is spelt. */
	spelling(): string {
		return this.text.slice(this.start, this.end);
	}

	/** Hands over the waiting metacomments. */
	takeMetaComments(): MetaComment[] {
		const taken = this.metaComments;
		this.metaComments = [];
		return taken;
	}

	/** @throws {InputError} `code` with line and column of `at`; "{place}" in the message becomes them. */
	fail(code: string, message: string, at = this.start, name?: string): never {
		const place = placeAt(this.text, at);
		throw new InputError(code, message.replace('{place}', placeInWords(place)), name === undefined ? place : { ...place, name });
	}

	private word(start: number): number {
		const text = this.text;
		const length = text.length;
		let at = start + 1;
		while (at < length) {
			const code = text.charCodeAt(at);
			if (code < PAST_LAST_END && ENDS_WORD[code] === 1) break;
			at += 1;
		}
		this.end = this.at = at;
		return WORD;
	}

	private mark(code: number): number {
		if (code === SINGLE_QUOTE || code === DOUBLE_QUOTE) return this.quoted(code === SINGLE_QUOTE ? "'" : '"');
		if (code === RIGHT_SQUARE)
			this.fail('unbalanced-comment', 'Expected a "[" before every "]"; the "]" at {place} closes no comment.');
		this.end = this.at = this.start + 1;
		this.lastMark = code;
		return code;
	}

	private quoted(quote: string): number {
		const text = this.text;
		let close = text.indexOf(quote, this.start + 1);
		while (close !== -1 && text[close + 1] === quote) close = text.indexOf(quote, close + 2);
		if (close === -1) {
			const advice = 'A label that holds a quote mark is itself quoted, with the mark doubled.';
			this.fail('unbalanced-quote', `Expected every quote mark to be closed; the one at {place} never is. ${advice}`);
		}
		this.end = this.at = close + 1;
		return QUOTED;
	}

	private skipComment(open: number): number {
		const text = this.text;
		let depth = 1;
		let at = open + 1;
		for (; at < text.length && depth > 0; at++) {
			const code = text.charCodeAt(at);
			if (code === LEFT_SQUARE) depth += 1;
			else if (code === RIGHT_SQUARE) depth -= 1;
		}
		if (depth > 0)
			this.fail('unbalanced-comment', 'Expected every comment to end with "]"; the "[" at {place} is never closed.', open);
		if (text.charCodeAt(open + 1) === AMPERSAND)
			this.metaComments.push({ body: text.slice(open + 2, at - 1), isOnBranch: this.lastMark === COLON });
		return at;
	}
}
