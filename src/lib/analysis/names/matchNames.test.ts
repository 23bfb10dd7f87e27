import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import { matchNames, type NameDecision, type NameMatching } from './matchNames.ts';

// All names are invented; every expected row is written by hand beside its names.
function match(tips: string[], species: string[], decisions: NameDecision[] = []): NameMatching {
	return matchNames({ tips, species, decisions });
}

function rowOf(matching: NameMatching, name: string) {
	return matching.rows.find(({ species, tip }) => species === name || (species === undefined && tip === name));
}

const KNOWN = 'Lychnorana glauca';

describe('matchNames, by themselves', () => {
	it.each([
		['Lychnorana arida', 'Lychnorana arida', 'exact', 'the same'],
		['Lychnorana arida', 'Lychnorana_arida', 'tidied', 'underscore for a blank'],
		['Lychnorana arida', 'lychnorana Arida', 'tidied', 'capital and small letters'],
		['Lychnorana arida', "'Lychnorana arida'", 'tidied', 'quotation marks dropped'],
		['Lychnorana arida', 'Lychnorana  arida ', 'tidied', 'spare blanks dropped'],
		['Lychnorana müller', 'Lychnorana mu\u0308ller', 'tidied', 'accents composed differently'],
		['Lychnorana fluvialis', 'Lychnorana fluvialis Orr', 'tidied', 'authority dropped: “Orr”'],
		[
			'Lychnorana fluvialis',
			'Lychnorana_fluvialis_(Linnaeus,_1758)',
			'tidied',
			'underscore for a blank, authority dropped: “(Linnaeus, 1758)”'
		],
		['Lychnorana fluvialis L.', 'Lychnorana fluvialis', 'tidied', 'authority dropped: “L.”'],
		[
			'Lychnorana fluvialis',
			'Lychnorana fluvialis de Candolle ex Smith & Orr',
			'tidied',
			'authority dropped: “de Candolle ex Smith & Orr”'
		],
		[
			'Lychnorana fluvialis (Orr, 1901)',
			'Lychnorana fluvialis Orr',
			'tidied',
			'authority written differently: “Orr”, “(Orr, 1901)”'
		]
	])('holds tip %j and species %j without a decision', (tip, species, kind, reason) => {
		const matching = match([tip, KNOWN], [species, KNOWN]);
		expect(rowOf(matching, species)).toEqual({ species, tip, kind, reason, settled: true });
		expect(matching.pairs).toContainEqual({ species, tip });
		expect(matching.dropped).toEqual([]);
	});

	it.each([
		['Lychnorana pallida', 'Lychnorana palida', 'one letter apart, and nothing else is close'],
		['Lychnorana pallida', 'Lychnorana palldia', 'two letters swapped, and nothing else is close'],
		['Lychnorana pallida', 'Lychnarana palida', 'two letters apart, and nothing else is close'],
		['Lychnorana pallida', 'L. pallida', 'shortened genus'],
		['L pallida', 'Lychnorana pallida', 'shortened genus'],
		['Lychnorana pallida KU1234', 'Lychnorana pallida', '“ku1234” follows the name on one side'],
		['Lychnorana pallida Orr', 'Lychnorana pallida Smith', 'different authorities: “Smith”, “Orr”']
	])('proposes tip %j for species %j and does not use it', (tip, species, reason) => {
		const matching = match([tip, KNOWN], [species, KNOWN]);
		expect(rowOf(matching, species)).toMatchObject({ species, tip, kind: 'probable', reason, settled: false });
		expect(matching.pairs).toEqual([{ species: KNOWN, tip: KNOWN }]);
		expect(matching.dropped.map(({ name }) => name)).toEqual([species, tip]);
		expect(matching.dropped[0]?.why).toContain('probably the same');
	});

	it('marks the letters that differ on either side', () => {
		const { differences } = rowOf(match(['Lychnorana pallida', KNOWN], ['Lychnorana palida', KNOWN]), 'Lychnorana palida') ?? {};
		expect(differences).toEqual({ species: [], tip: [[14, 15]] });
	});

	it.each([
		['Lychnorana tumida', 'Lychnorana sericea'],
		['Ava', 'Ova'],
		['Una brevis', 'Una levior'],
		['Lychnorana pallida', 'Mycterana pallida']
	])('proposes nothing for tip %j and species %j', (tip, species) => {
		const matching = match([tip, KNOWN], [species, KNOWN]);
		expect(rowOf(matching, species)).toEqual({
			species,
			kind: 'only-in-data',
			reason: 'no close spelling in the tree',
			settled: false
		});
		expect(rowOf(matching, tip)).toEqual({ tip, kind: 'only-in-tree', reason: 'no close spelling in the data', settled: false });
		expect(matching.dropped).toEqual([
			{ name: species, in: 'data', why: 'not in the tree' },
			{ name: tip, in: 'tree', why: 'not in the data' }
		]);
	});

	it('takes the nearer of two spellings', () => {
		const matching = match(['Lychnorana pallida', 'Lychnorana pallidor'], ['Lychnorana pallda']);
		expect(rowOf(matching, 'Lychnorana pallda')).toMatchObject({ kind: 'probable', tip: 'Lychnorana pallida' });
	});
});

describe('matchNames, several claims', () => {
	it('leaves the choice to a person when two species tidy to one tip', () => {
		const names = ['Lychnorana arida', 'Lychnorana_arida'];
		const matching = match(['Lychnorana arida', KNOWN], [...names, KNOWN]);
		for (const name of names)
			expect(rowOf(matching, name)).toMatchObject({ kind: 'twice', settled: false, candidates: ['Lychnorana arida'] });
		expect(matching.pairs).toEqual([{ species: KNOWN, tip: KNOWN }]);
		const chosen = match(['Lychnorana arida', KNOWN], [...names, KNOWN], [{ from: 'Lychnorana_arida', to: 'Lychnorana arida' }]);
		expect(chosen.pairs).toContainEqual({ species: 'Lychnorana_arida', tip: 'Lychnorana arida' });
		expect(rowOf(chosen, 'Lychnorana arida')).toMatchObject({
			kind: 'twice',
			settled: true,
			reason: '“Lychnorana_arida” was chosen for this tip'
		});
		const rest = match(['Lychnorana arida', KNOWN], [...names, KNOWN], [{ from: 'Lychnorana_arida', to: null }]);
		expect(rest.pairs).toContainEqual({ species: 'Lychnorana arida', tip: 'Lychnorana arida' });
	});

	it('leaves the choice to a person when two tips tidy to one species', () => {
		const tips = ['Lychnorana arida Orr', 'Lychnorana arida Smith'];
		const matching = match([...tips, KNOWN], ['Lychnorana arida', KNOWN]);
		expect(rowOf(matching, 'Lychnorana arida')).toMatchObject({
			kind: 'twice',
			candidates: tips,
			reason: '2 tips have this name'
		});
		const chosen = match(
			[...tips, KNOWN],
			['Lychnorana arida', KNOWN],
			[{ from: 'Lychnorana arida', to: 'Lychnorana arida Orr' }]
		);
		expect(rowOf(chosen, 'Lychnorana arida Smith')).toMatchObject({
			settled: true,
			reason: '“Lychnorana arida” was given another tip'
		});
	});

	it('keeps homonyms apart that both sides spell with their authorities', () => {
		const names = ['Lychnorana arida Orr', 'Lychnorana arida Smith'];
		expect(match(names, [...names].reverse()).rows.map(({ kind }) => kind)).toEqual(['exact', 'exact']);
	});

	it('does not choose between equally near spellings', () => {
		const tips = ['Lychnorana pallida', 'Lychnorana pallido'];
		const matching = match(tips, ['Lychnorana pallidu']);
		expect(rowOf(matching, 'Lychnorana pallidu')).toMatchObject({ kind: 'twice', candidates: tips });
		expect(matching.rows[0]?.reason).toBe('equally close to “Lychnorana pallida” and “Lychnorana pallido”');
		const rivals = match(['Lychnorana pallidu', KNOWN], [...tips, KNOWN]);
		expect(rowOf(rivals, 'Lychnorana pallida')?.reason).toBe('close to “Lychnorana pallidu”, as is “Lychnorana pallido”');
	});

	it('does not read a shortened genus that fits two tips', () => {
		const matching = match(['Lychnorana arida', 'Lithorana arida'], ['L. arida']);
		expect(matching.rows[0]).toMatchObject({ kind: 'twice', candidates: ['Lychnorana arida', 'Lithorana arida'] });
	});
});

describe('matchNames, decisions', () => {
	it('uses an accepted proposal and a pair made by hand', () => {
		const decisions = [
			{ from: 'Lychnorana palida', to: 'Lychnorana pallida', why: 'misspelt' },
			{ from: 'Lychnorana sericea', to: 'Lychnorana tumida' }
		];
		const matching = match(['Lychnorana pallida', 'Lychnorana tumida'], ['Lychnorana palida', 'Lychnorana sericea'], decisions);
		expect(matching.rows[0]).toMatchObject({
			kind: 'probable',
			reason: 'one letter apart',
			settled: true,
			decision: decisions[0]
		});
		expect(matching.rows[1]).toMatchObject({ kind: 'probable', reason: 'paired by hand', settled: true });
		expect(matching.pairs).toHaveLength(2);
		expect(matching.remarks).toEqual([]);
	});

	it('leaves out what a person leaves out, on either side, and says why', () => {
		const decisions = [
			{ from: KNOWN, to: null, why: 'a hybrid' },
			{ from: 'Lychnorana tumida', to: null }
		];
		const matching = match([KNOWN, 'Lychnorana tumida', 'Lychnorana arida'], [KNOWN, 'Lychnorana arida'], decisions);
		expect(matching.counts.open).toBe(0);
		expect(matching.dropped).toEqual([
			{ name: KNOWN, in: 'data', why: 'left out by decision: a hybrid' },
			{ name: KNOWN, in: 'tree', why: `“${KNOWN}” was left out` },
			{ name: 'Lychnorana tumida', in: 'tree', why: 'left out by decision' }
		]);
	});

	it('uses neither of two species that were given one tip', () => {
		const decisions = ['Lychnorana arida', 'Lychnorana tarda'].map((from) => ({ from, to: 'Lychnorana tumida' }));
		const matching = match(['Lychnorana tumida', KNOWN], ['Lychnorana arida', 'Lychnorana tarda', KNOWN], decisions);
		expect(matching.pairs).toEqual([{ species: KNOWN, tip: KNOWN }]);
		expect(matching.rows[0]).toMatchObject({
			kind: 'twice',
			settled: false,
			reason: '“Lychnorana tarda” was given the same tip'
		});
		expect(matching.remarks[0]?.message).toBe(
			'The tip “Lychnorana tumida” was given to “Lychnorana arida” and “Lychnorana tarda”; none of them is used. Choose one.'
		);
	});

	it('tells of decisions about names that are gone, and does not use them', () => {
		const decisions = [
			{ from: 'Lychnorana gone', to: KNOWN },
			{ from: KNOWN, to: 'Lychnorana gone' }
		];
		const matching = match([KNOWN], [KNOWN], decisions);
		expect(matching.pairs).toEqual([{ species: KNOWN, tip: KNOWN }]);
		expect(matching.remarks.map(({ code, message }) => `${code}: ${message}`)).toEqual([
			'decision-unused: The decision about “Lychnorana gone” is kept but not used: “Lychnorana gone” is not in the data.',
			`decision-unused: The decision about “${KNOWN}” is kept but not used: the tree has no tip “Lychnorana gone”.`
		]);
	});
});

describe('matchNames, what it tells', () => {
	it('has a remark for each species left out and one for the tips', () => {
		const matching = match([KNOWN, 'Lychnorana tumida', 'Lychnorana vestita'], [KNOWN, 'Mycterana obscura']);
		expect(matching.remarks).toEqual([
			{
				level: 'look',
				code: 'species-left-out',
				message: '“Mycterana obscura” is left out: not in the tree.',
				where: { name: 'Mycterana obscura' }
			},
			{
				level: 'look',
				code: 'tips-left-out',
				message: '2 tips of the tree are left out: “Lychnorana tumida” and “Lychnorana vestita”.'
			}
		]);
	});

	it.each([
		[['Una alta', 'Una bella'], ['Una alta', 'Una bella'], '2 tips and 2 species. Two agree as written. Every name is settled.'],
		[
			['Una alta', 'Una bella'],
			['Una_alta', 'Una bella Orr'],
			'2 tips and 2 species. One agrees after tidying underscores, one lost its author’s name. Every name is settled.'
		],
		[['Una alta'], ['una alta', 'Una maxima'], '1 tip and 2 species. One agrees after tidying their spelling. One needs you.'],
		[
			['Una pallida', 'Una maxima'],
			['Una palida', 'Una crassula'],
			'2 tips and 2 species. None agrees as written. Three need you.'
		]
	])('sums up %j and %j', (tips, species, sentence) => {
		expect(match(tips, species).sentence).toBe(sentence);
	});

	it('counts rows of each kind, pairs and what is open', () => {
		const { counts } = match(
			[KNOWN, 'Lychnorana pallida', 'Lychnorana tumida'],
			[KNOWN, 'Lychnorana palida', 'Mycterana obscura']
		);
		expect(counts).toEqual({
			tips: 3,
			species: 3,
			pairs: 1,
			open: 3,
			byKind: { exact: 1, tidied: 0, probable: 1, 'only-in-tree': 1, 'only-in-data': 1, twice: 0 }
		});
	});

	it('refuses names that have nothing in common, unless a person has begun to pair them', () => {
		const run = () => match(['Una alta', 'Una bella'], ['Mycterana obscura']);
		expect(run).toThrow(InputError);
		expect(run).toThrow(
			'The tree has 2 tips (“Una alta” and “Una bella”), the data 1 species (“Mycterana obscura”). Are they of one clade?'
		);
		expect(() => match([], ['Una alta'])).toThrow('0 tips (none)');
		expect(match(['Una alta'], ['Mycterana obscura'], [{ from: 'Mycterana obscura', to: 'Una alta' }]).pairs).toHaveLength(1);
	});
});

describe('matchNames, for any names', () => {
	const word = fc.stringMatching(/^[a-e]{3,7}$/);
	const names = fc.uniqueArray(
		fc.tuple(word, word).map(([genus, epithet]) => `${genus.charAt(0).toUpperCase()}${genus.slice(1)} ${epithet}`),
		{ minLength: 1, maxLength: 12 }
	);

	it('uses no name twice and tells of every name once', () => {
		fc.assert(
			fc.property(names, names, (tips, species) => {
				fc.pre(tips[0] !== undefined);
				const matching = match([...new Set([...tips, 'Xus communis'])], [...new Set([...species, 'Xus communis'])]);
				const usedTips = matching.pairs.map(({ tip }) => tip);
				expect(new Set(usedTips).size).toBe(usedTips.length);
				const inData = [
					...matching.pairs.map((pair) => pair.species),
					...matching.dropped.filter((d) => d.in === 'data').map(({ name }) => name)
				];
				const inTree = [...usedTips, ...matching.dropped.filter((d) => d.in === 'tree').map(({ name }) => name)];
				expect(inData.toSorted()).toEqual([...species, 'Xus communis'].toSorted());
				expect(inTree.toSorted()).toEqual([...tips, 'Xus communis'].toSorted());
			})
		);
	});

	it('pairs the same names whatever their order', () => {
		fc.assert(
			fc.property(names, names, (tips, species) => {
				const all = { tips: [...tips, 'Xus communis'], species: [...species, 'Xus communis'], decisions: [] };
				const turned = { ...all, tips: all.tips.toReversed(), species: all.species.toReversed() };
				const key = ({ species: s = '', tip = '', kind }: { species?: string; tip?: string; kind: string }) =>
					`${s}|${tip}|${kind}`;
				expect(matchNames(turned).rows.map(key).toSorted()).toEqual(matchNames(all).rows.map(key).toSorted());
			})
		);
	});
});
