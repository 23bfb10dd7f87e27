import { labelShown } from './label.ts';
import { parseMetaComment } from './metaComment.ts';
import { parseDecimal } from './parseDecimal.ts';
import { placeAt, placeInWords } from './placeAt.ts';
import type { ReadingNotes } from './readingNotes.ts';
import { CLOSE, COLON, COMMA, END, OPEN, QUOTED, type Scanner, SEMICOLON, WORD } from './scanner.ts';
import { skimTips } from './skimTips.ts';
import { spelledName, TipNames } from './tipNames.ts';
import type { Tree } from './tree.ts';
import { TreeBuffer } from './treeBuffer.ts';
import { NODE_LIMIT, TIP_LIMIT } from './treeLimits.ts';

const NONE = -1;
/** Not a token: the tree has ended. */
const DONE = -2;
const NETWORK_LABEL = /#(?:H|LGT|R)\d+$/i;
const ROOTED = /^R$/i;
const UNROOTED = /^U$/i;

/** A tree as its text gives it; `rooted` only where the text says so. */
export type ReadTree = { readonly tree: Tree; readonly rooted: boolean | undefined };

/**
 * Reads trees one after the other from a scanner. Node indices follow the opening of brackets, which is preorder, so
 * nothing is sorted and nothing recurses: depth costs no stack.
 */
export class NewickReader {
	readonly scanner: Scanner;
	names = new TipNames(spelledName);
	treeCount = 0;
	private readonly notes: ReadingNotes;
	private readonly buffer = new TreeBuffer();
	/** the node whose text has begun and not ended; NONE while a subtree is awaited */
	private node = NONE;
	/** innermost node whose ")" is still to come */
	private open = NONE;
	private tipCount = 0;
	private hasLength = false;
	private hasLabel = false;
	private rooted: boolean | undefined = undefined;

	constructor(scanner: Scanner, notes: ReadingNotes) {
		this.scanner = scanner;
		this.notes = notes;
	}

	/** Reads the tree whose first "(" the scanner has just given, up to and with its semicolon. */
	readTree(): ReadTree {
		this.buffer.clear();
		this.node = this.open = NONE;
		this.tipCount = 0;
		this.rooted = undefined;
		let token = OPEN;
		while (token !== DONE) token = this.node === NONE ? this.begin(token) : this.proceed(token);
		this.treeCount += 1;
		return { tree: this.buffer.toTree(), rooted: this.rooted };
	}

	/** Takes the first token of a subtree and gives the first one not used. */
	private begin(token: number): number {
		if (token === OPEN) return this.beginInner();
		if (token === WORD || token === QUOTED) return this.beginTip(token);
		if (token === END) this.failUnclosed();
		const found = this.scanner.spelling();
		const advice = 'Give the tip its name, or take the empty place out.';
		return this.scanner.fail(
			'unnamed-tip',
			`Expected every tip to have a name; found "${found}" in its place at {place}. ${advice}`
		);
	}

	private beginInner(): number {
		const { buffer, scanner } = this;
		if (buffer.count >= NODE_LIMIT)
			scanner.fail(
				'too-many-nodes',
				`Expected at most ${NODE_LIMIT.toLocaleString('en')} nodes in a tree; the next begins at {place}.`
			);
		this.open = buffer.add(this.open, scanner.start);
		if (scanner.metaComments.length > 0) this.takeMetaComments(this.open);
		return scanner.next();
	}

	private beginTip(token: number): number {
		const { buffer, scanner } = this;
		const start = scanner.start;
		const node = buffer.add(this.open, start);
		this.tipCount += 1;
		if (this.tipCount > TIP_LIMIT) this.failTipLimit();
		const spelling = scanner.spelling();
		const next = scanner.next();
		const whole = next === WORD || next === QUOTED ? this.joinWords(token, spelling, next) : spelling;
		const { label, labelRaw, lastMet } = this.names.get(whole, start);
		if (token === WORD) this.refuseNetwork(labelRaw, start);
		if (label === '') scanner.fail('unnamed-tip', 'Expected every tip to have a name; the one at {place} is empty.', start);
		if (lastMet.tree === this.treeCount) this.failDuplicate(label, lastMet.at, start);
		lastMet.tree = this.treeCount;
		lastMet.at = start;
		buffer.label[node] = label;
		buffer.labelRaw[node] = labelRaw;
		this.node = node;
		this.hasLabel = true;
		this.hasLength = false;
		return whole === spelling ? next : this.tokenAfterWords;
	}

	/** Takes what may follow inside or after a node and gives the first token not used. */
	private proceed(token: number): number {
		if (token === COMMA) {
			this.finishNode();
			if (this.open === NONE)
				this.scanner.fail('unbalanced-brackets', 'Expected every "," inside brackets; the one at {place} is outside.');
			this.node = NONE;
			return this.scanner.next();
		}
		if (token === CLOSE) return this.closeNode();
		if (token === COLON) return this.readLength();
		if (token === WORD || token === QUOTED) return this.readInnerLabel(token);
		return this.endTree(token);
	}

	private closeNode(): number {
		const { buffer, scanner, open } = this;
		this.finishNode();
		if (open === NONE) scanner.fail('unbalanced-brackets', 'Expected a "(" for every ")"; the ")" at {place} closes nothing.');
		if (buffer.childCount[open] === 1) this.notes.add('single-child', buffer.start[open] ?? 0, this.treeCount);
		this.node = open;
		this.open = buffer.parent[open] ?? NONE;
		this.hasLabel = this.hasLength = false;
		return scanner.next();
	}

	private readLength(): number {
		const { buffer, node, scanner } = this;
		if (this.hasLength) scanner.fail('bad-length', 'Expected one length for each branch; a second ":" stands at {place}.');
		const token = scanner.next();
		const length = token === WORD ? parseDecimal(scanner.text, scanner.start, scanner.end) : NaN;
		if (!Number.isFinite(length)) this.failLength(token);
		if (length < 0) this.failNegative(length);
		buffer.length[node] = length === 0 ? 0 : length; // "-0" too is 0
		this.hasLength = true;
		return scanner.next();
	}

	private readInnerLabel(token: number): number {
		const { buffer, node, scanner } = this;
		const start = scanner.start;
		const spelling = scanner.spelling();
		if (this.hasLength || this.hasLabel) {
			const rule = 'Expected "," or ")" or ";" after a branch';
			scanner.fail('missing-comma', `${rule}; found "${spelling}" at {place}. Put the missing comma or bracket in.`);
		}
		const next = scanner.next();
		const whole = next === WORD || next === QUOTED ? this.joinWords(token, spelling, next) : spelling;
		if (token === WORD) this.refuseNetwork(whole, start);
		buffer.label[node] = labelShown(whole);
		buffer.labelRaw[node] = whole;
		this.hasLabel = true;
		return whole === spelling ? next : this.tokenAfterWords;
	}

	/** the token that ended the last label of several words */
	private tokenAfterWords = END;

	/** Unquoted words with blanks between them are one label, and a remark; a quoted label stands alone. */
	private joinWords(token: number, spelling: string, next: number): string {
		const { notes, scanner } = this;
		const start = scanner.start;
		let whole = spelling;
		let following = next;
		while (token === WORD && following === WORD) {
			whole += ` ${scanner.spelling()}`;
			following = scanner.next();
		}
		if (following === WORD || following === QUOTED) {
			const advice = 'Quote the whole label, with a quote mark inside it doubled, or put the missing comma in.';
			scanner.fail(
				'two-labels',
				`Expected one label for a node; found "${whole}" and ${scanner.spelling()} at {place}. ${advice}`
			);
		}
		notes.add('blank-in-label', start, this.treeCount, whole);
		this.tokenAfterWords = following;
		return whole;
	}

	private finishNode(): void {
		const { buffer, node, scanner } = this;
		if (!this.hasLength && buffer.parent[node] !== NONE)
			this.notes.add('missing-length', buffer.start[node] ?? 0, this.treeCount, buffer.label[node]);
		if (scanner.metaComments.length > 0) this.takeMetaComments(node);
	}

	/** Before the first bracket they speak of the tree: `[&R]`, `[&U]`; a weight or anything else is passed over. */
	private takeMetaComments(node: number): void {
		const isOfTree = node === 0 && this.buffer.childCount[0] === 0;
		for (const { body, isOnBranch } of this.scanner.takeMetaComments()) {
			if (!isOfTree) {
				const entries = parseMetaComment(body);
				const prefix = isOnBranch ? 'branch:' : '';
				this.buffer.annotate(
					node,
					entries.map(([key, value]) => [prefix + key, value])
				);
			} else if (ROOTED.test(body.trim())) this.rooted = true;
			else if (UNROOTED.test(body.trim())) this.rooted = false;
		}
	}

	private endTree(token: number): number {
		const { buffer, notes, scanner } = this;
		if (this.open !== NONE && token === OPEN)
			scanner.fail(
				'missing-comma',
				'Expected "," or ")" after a branch; found "(" at {place}. Put the missing comma or bracket in.'
			);
		if (this.open !== NONE) this.failUnclosed();
		this.finishNode();
		if ((buffer.length[0] ?? 0) > 0) notes.add('root-length', buffer.start[0] ?? 0, this.treeCount);
		buffer.length[0] = 0;
		if (token !== SEMICOLON) notes.add('missing-semicolon', scanner.start, this.treeCount);
		if (token === OPEN) scanner.at = scanner.start;
		return DONE;
	}

	private refuseNetwork(spelling: string, at: number): void {
		if (!spelling.includes('#') || !NETWORK_LABEL.test(spelling)) return;
		const rule = `Expected a tree, in which every node has one parent; "${spelling}" at {place} marks a node with two, so this is a network`;
		this.scanner.fail('network', `${rule}. The test needs a tree: bring the species tree without the crossings.`, at, spelling);
	}

	private failUnclosed(): never {
		const open = this.open === NONE ? 0 : (this.buffer.start[this.open] ?? 0);
		const end = placeInWords(placeAt(this.scanner.text, this.scanner.start));
		return this.scanner.fail(
			'unbalanced-brackets',
			`Expected a ")" for every "("; the "(" at {place} is still open at ${end}.`,
			open
		);
	}

	private failTipLimit(): never {
		const figure = (TIP_LIMIT + skimTips(this.scanner)).toLocaleString('en');
		const tree = this.treeCount + 1;
		const message = `Expected at most ${TIP_LIMIT.toLocaleString('en')} tips in a tree; tree ${tree}, which begins at {place}, has ${figure}.`;
		return this.scanner.fail('too-many-tips', message, this.buffer.start[0]);
	}

	private failDuplicate(label: string, first: number, second: number): never {
		const places = `${placeInWords(placeAt(this.scanner.text, first))} and again at {place}`;
		return this.scanner.fail(
			'duplicate-tip',
			`Expected every tip name once in a tree; "${label}" stands at ${places}.`,
			second,
			label
		);
	}

	private failLength(token: number): never {
		const found = token === END ? 'the end of the text' : `"${this.scanner.spelling()}"`;
		const message = `Expected a number for the length of ${this.whose()}; found ${found} at {place}. Write it like 0.21 or 2.1e-1.`;
		return this.scanner.fail('bad-length', message, this.scanner.start, this.buffer.label[this.node]);
	}

	private failNegative(length: number): never {
		const message = `Expected every branch length to be at least 0; ${this.whose()} has ${length} at {place}.`;
		const advice = 'Consensus trees can hold such branches: bring a tree with consistent node ages.';
		return this.scanner.fail('negative-length', `${message} ${advice}`, this.scanner.start, this.buffer.label[this.node]);
	}

	private whose(): string {
		const label = this.buffer.label[this.node] ?? '';
		const kind = this.buffer.childCount[this.node] === 0 ? 'tip' : 'node';
		if (label !== '') return `${kind} "${label}"`;
		return `the clade that opens at ${placeInWords(placeAt(this.scanner.text, this.buffer.start[this.node] ?? 0))}`;
	}
}
