import { labelShown } from './label.ts';
import { COMMA, END, QUOTED, Scanner, SEMICOLON, WORD } from './scanner.ts';
import { TREE_LIMIT } from './treeLimits.ts';

const EQUALS = 61;
const ASTERISK = 42;

/** Walks the commands of a NEXUS text. A command is its first word and whatever follows up to the semicolon. */
export class NexusCommands {
	readonly scanner: Scanner;

	/** @param text - begins with `#NEXUS`, after blanks and a byte order mark if any */
	constructor(text: string) {
		this.scanner = new Scanner(text, text.indexOf('#') + '#nexus'.length);
	}

	/** First word of the next command, in lower case; undefined at the end. */
	nextCommand(): string | undefined {
		let token = this.scanner.next();
		while (token !== END && token !== WORD) token = this.scanner.next();
		return token === END ? undefined : this.scanner.spelling().toLowerCase();
	}

	/** Passes over the rest of a command; the last character read may be its semicolon already. */
	skipCommand(): void {
		const { scanner } = this;
		if (scanner.text[scanner.at - 1] === ';') return;
		scanner.at = endOfCommand(scanner.text, scanner.at);
	}

	/** One word or quoted label, as spelt; '' when a mark stands there. */
	readWord(): string {
		const token = this.scanner.next();
		return token === WORD || token === QUOTED ? this.scanner.spelling() : '';
	}

	/** All words of a command, as spelt. */
	readWords(): string[] {
		const words: string[] = [];
		for (let token = this.scanner.next(); token !== SEMICOLON && token !== END; token = this.scanner.next())
			if (token === WORD || token === QUOTED) words.push(this.scanner.spelling());
		return words;
	}

	/** The table of a TRANSLATE command: key as shown to label as spelt. A comma before the semicolon is allowed. */
	readTranslate(): Map<string, string> {
		const { scanner } = this;
		const table = new Map<string, string>();
		for (let token = scanner.next(); token !== SEMICOLON; token = this.afterPair()) {
			if (token !== WORD && token !== QUOTED) this.failTranslate('a key');
			const key = labelShown(scanner.spelling());
			if (table.has(key))
				scanner.fail(
					'bad-translate',
					`Expected every key of TRANSLATE once; "${key}" stands again at {place}.`,
					scanner.start,
					key
				);
			const label = scanner.next();
			if (label !== WORD && label !== QUOTED) this.failTranslate(`a label for the key "${key}"`);
			table.set(key, scanner.spelling());
		}
		return table;
	}

	/** What stands between TREE and "=": the mark of the default tree and the name; comments are passed over. */
	readTreeName(): { name: string; isDefault: boolean } {
		const words: string[] = [];
		let isDefault = false;
		let token = this.nextOfCommand();
		for (; token === WORD || token === QUOTED || token === ASTERISK; token = this.nextOfCommand()) {
			if (token === ASTERISK) isDefault = true;
			else words.push(labelShown(this.scanner.spelling()));
		}
		const name = words.join(' ');
		if (token !== EQUALS)
			this.scanner.fail(
				'not-a-tree',
				`Expected "=" after the name of tree "${name}"; found "${this.scanner.spelling()}" at {place}.`
			);
		this.scanner.takeMetaComments();
		return { name, isDefault };
	}

	failTreeLimit(): never {
		const start = this.scanner.start;
		let count = TREE_LIMIT;
		for (let word: string | undefined = 'tree'; word !== undefined; word = this.nextCommand()) {
			if (word === 'tree' || word === 'utree') count += 1;
			this.skipCommand();
		}
		const figures = `Expected at most ${TREE_LIMIT.toLocaleString('en')} trees in a text; found ${count.toLocaleString('en')}`;
		return this.scanner.fail('too-many-trees', `${figures}, the first too many at {place}. Thin the sample.`, start);
	}

	/** After a pair stands a comma, and then a key or the semicolon, or the semicolon at once. */
	private afterPair(): number {
		const token = this.scanner.next();
		if (token === SEMICOLON) return token;
		if (token !== COMMA) this.failTranslate('"," or ";"');
		return this.scanner.next();
	}

	private failTranslate(expected: string): never {
		const found = this.scanner.spelling() === '' ? 'the end of the text' : `"${this.scanner.spelling()}"`;
		return this.scanner.fail('bad-translate', `Expected ${expected} in TRANSLATE; found ${found} at {place}.`);
	}

	/** The next token, with "=" and a leading "*" as marks of their own, as they are outside the tree itself. */
	private nextOfCommand(): number {
		const { scanner } = this;
		const token = scanner.next();
		if (token !== WORD) return token;
		const code = scanner.text.charCodeAt(scanner.start);
		const equals = scanner.spelling().indexOf('=');
		const isMark = code === EQUALS || code === ASTERISK;
		if (isMark) scanner.end = scanner.at = scanner.start + 1;
		else if (equals !== -1) scanner.end = scanner.at = scanner.start + equals;
		return isMark ? code : token;
	}
}

/** Offset past the next semicolon outside comments and quotes. A quote mark that is never closed is an apostrophe. */
function endOfCommand(text: string, from: number): number {
	let depth = 0;
	for (let at = from; at < text.length; at++) {
		const character = text[at];
		if (character === '[') depth += 1;
		else if (character === ']') depth = Math.max(0, depth - 1);
		else if (depth > 0) continue;
		else if (character === ';') return at + 1;
		else if (character === "'") {
			const close = text.indexOf("'", at + 1);
			if (close !== -1) at = close;
		}
	}
	return text.length;
}
