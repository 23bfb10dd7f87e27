import { describe, expect, it } from 'vitest';
import { looksLikeCovariate } from './looksLikeCovariate.ts';

// Expected kinds by hand.
describe('looksLikeCovariate', () => {
	it.each([
		['species,a,b\na,0,221.1\nb,221.1,0', 'values beyond any overlap'],
		['species;a;b\na;0;2,5\nb;2,5;0', 'distances above 1 with decimal commas'],
		['"species","lat","lon"\na,1,2', 'a table of places'],
		['species_a,species_b,distance\na,b,7\na,c,9', 'a list that says distance']
	])('takes %j for a covariate (%s)', (text) => {
		expect(looksLikeCovariate(text)).toBe(true);
	});

	it.each([
		['species,a,b\na,1,0.5\nb,0.5,1', 'overlaps'],
		['species,a,b\na,0,0.5\nb,0.5,0', 'overlaps as distances'],
		['species,a,b\na,100,52\nb,52,100', 'overlaps in per cent'],
		['species,a,b\na\nb,52', 'a half without its diagonal, in per cent'],
		['species_a,species_b,overlap\na,b,0.7', 'a list of overlaps']
	])('leaves %j a matrix (%s)', (text) => {
		expect(looksLikeCovariate(text)).toBe(false);
	});
});
