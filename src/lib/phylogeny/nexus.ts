import type { Remark } from '#lib/remarks/remark.ts';
import { namedTree } from './newick.ts';
import { NewickReader } from './newickReader.ts';
import { NexusCommands } from './nexusCommands.ts';
import { labelShown } from './label.ts';
import { ReadingNotes } from './readingNotes.ts';
import { OPEN } from './scanner.ts';
import { spelledName, type TipName, TipNames } from './tipNames.ts';
import type { NamedTree } from './tree.ts';
import { TREE_LIMIT } from './treeLimits.ts';

const TREES_BLOCK = 'trees';
const NUMERAL = /^\d+$/;
/** Words that open a command of a TREES block: as the label of a root they mean that a semicolon is missing. */
const COMMAND_WORD = /^(?:end|endblock|begin|tree|utree)(?:\s|$|=)/i;

/**
 * Trees of all TREES blocks of a NEXUS text, in their order, with their names. A tip is looked up first among the keys of
 * TRANSLATE, then the names of TAXLABELS, then, when it is a number, by its place in TAXLABELS. Other blocks and commands
 * are skipped. Key words may have any case; names may not.
 *
 * Limits and metacomments as in `parseNewick`.
 *
 * @throws {InputError} with line and column: `no-trees-block`, `no-trees`, `bad-translate`, `not-in-translate`,
 *   `missing-semicolon`, `not-a-tree`, and the codes of `parseNewick`
 * @see Maddison, Swofford & Maddison (1997), doi:10.1093/sysbio/46.4.590
 */
export function parseNexus(text: string): { trees: NamedTree[]; remarks: Remark[] } {
	const file = new NexusFile(text);
	for (let word = file.commands.nextCommand(); word !== undefined; word = file.commands.nextCommand()) file.read(word);
	return { trees: file.finished(), remarks: file.notes.remarks(text) };
}

class NexusFile {
	readonly commands: NexusCommands;
	readonly notes = new ReadingNotes();
	private readonly reader: NewickReader;
	private readonly trees: NamedTree[] = [];
	private block = '';
	private blockCount = 0;
	private taxa: readonly string[] = [];
	private taxonLabels = new Set<string>();
	private translate: ReadonlyMap<string, string> = new Map();

	constructor(text: string) {
		this.commands = new NexusCommands(text);
		this.reader = new NewickReader(this.commands.scanner, this.notes);
	}

	read(word: string): void {
		const { commands } = this;
		if (word === 'begin') this.beginBlock();
		else if (word === 'end' || word === 'endblock') this.block = '';
		else if (word === 'taxlabels') this.readTaxa();
		else if (this.block === TREES_BLOCK && word === 'translate') this.translate = commands.readTranslate();
		else if (this.block === TREES_BLOCK && (word === 'tree' || word === 'utree')) return this.readTree(word === 'utree');
		commands.skipCommand();
	}

	finished(): NamedTree[] {
		const { scanner } = this.commands;
		if (this.blockCount === 0)
			scanner.fail(
				'no-trees-block',
				'Expected a TREES block ("begin trees;"); the text ends at {place} without one. Bring the file with the trees.'
			);
		if (this.trees.length === 0)
			scanner.fail(
				'no-trees',
				'Expected a TREE command in the TREES block; the text ends at {place} without one. Bring the file with the trees.'
			);
		return this.trees;
	}

	private beginBlock(): void {
		this.block = this.commands.readWord().toLowerCase();
		if (this.block !== TREES_BLOCK) return;
		this.blockCount += 1;
		this.translate = new Map();
		this.reader.names = new TipNames((spelling, at) => this.resolve(spelling, at));
	}

	private readTaxa(): void {
		this.taxa = this.commands.readWords();
		this.taxonLabels = new Set(this.taxa.map(labelShown));
		this.reader.names = new TipNames((spelling, at) => this.resolve(spelling, at));
	}

	private resolve(spelling: string, at: number): TipName {
		const token = labelShown(spelling);
		const translated = this.translate.get(token);
		if (translated !== undefined) return spelledName(translated);
		if (this.taxonLabels.has(token)) return spelledName(spelling);
		const taxon = NUMERAL.test(token) ? this.taxa[Number(token) - 1] : undefined;
		if (taxon !== undefined) return spelledName(taxon);
		if (this.translate.size > 0) this.noteUntranslated(token, at);
		return spelledName(spelling);
	}

	private noteUntranslated(token: string, at: number): void {
		if (!NUMERAL.test(token)) return this.notes.add('not-in-translate', at, this.trees.length, token);
		const rule = `Expected every number of a tree in its TRANSLATE table; "${token}" at {place} is not among the ${this.translate.size} keys`;
		this.commands.scanner.fail('not-in-translate', `${rule}. Add it to the table.`, at, token);
	}

	private readTree(isUnrooted: boolean): void {
		const { commands, notes, reader, trees } = this;
		const { scanner } = commands;
		if (trees.length === TREE_LIMIT) commands.failTreeLimit();
		const { name, isDefault } = commands.readTreeName();
		if (scanner.next() !== OPEN) {
			const found = scanner.spelling();
			scanner.fail(
				'not-a-tree',
				`Expected "(" after the "=" of tree "${name}"; found "${found}" at {place}.`,
				scanner.start,
				name
			);
		}
		const start = scanner.start;
		const { tree, rooted } = reader.readTree();
		if (COMMAND_WORD.test(tree.labelRaw[0] ?? ''))
			scanner.fail('missing-semicolon', `Expected ";" at the end of tree "${name}", which begins at {place}.`, start, name);
		const rooting = isUnrooted ? false : rooted;
		if (rooting === false) notes.add('unrooted', start, trees.length, name);
		trees.push(namedTree(name, { tree, rooted: rooting }, isDefault));
	}
}
