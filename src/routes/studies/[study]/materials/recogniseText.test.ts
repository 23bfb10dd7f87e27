import { describe, expect, it } from 'vitest';
import { recogniseText } from './recogniseText.ts';

// Expected kinds by hand: the grammar of Newick opens with a bracket, that of NEXUS with #NEXUS.
describe('recogniseText', () => {
	it.each([
		['((a:1,b:1):1,c:2);', 'Newick'],
		['\uFEFF  \r\n(a:1,b:1);', 'a byte order mark and blanks before'],
		['[ages in Ma]\n[&R] (a:1,b:1);', 'comments before'],
		['#nexus\nbegin trees;', 'NEXUS in small letters'],
		['BEGIN TREES;\ntree one = (a:1,b:1);', 'a block without its heading']
	])('takes %j for trees (%s)', (text) => {
		expect(recogniseText(text)).toBe('trees');
	});

	it.each([
		['species,a,b\na,1,0.5\nb,0.5,1', 'a square'],
		[';a;b\na;1,0;\nb;0,5;1,0', 'semicolons and an empty corner'],
		['Beginnia alba\t0.5', 'a name that begins like a block'],
		['nexus,a\na,1', 'a word without its sign']
	])('takes %j for a table (%s)', (text) => {
		expect(recogniseText(text)).toBe('matrix');
	});

	it('tells words without any number', () => {
		expect(recogniseText('We measured the overlap of four frogs, in spring; see below.')).toBe('words');
		expect(recogniseText('species,a,b\na,NA,NA')).toBe('words');
	});

	it('finds the numbers of a table whose names alone fill its beginning', () => {
		const names = Array.from({ length: 900 }, () => 'Rana alba').join();
		expect(recogniseText(`species,${names}\nRana alba,1`)).toBe('matrix');
	});

	it('tells a word processor’s file', () => {
		expect(recogniseText('{\\rtf1\\ansi (a:1,b:1);}')).toBe('rich-text');
	});
});
