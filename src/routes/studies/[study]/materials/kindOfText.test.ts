import { describe, expect, it } from 'vitest';
import { InputError } from '#lib/remarks/inputError.ts';
import { kindOfText } from './kindOfText.ts';

function refusal(text: string): InputError {
	try {
		kindOfText(text);
	} catch (thrown) {
		if (thrown instanceof InputError) return thrown;
	}
	throw new Error('Expected the text to be refused.');
}

// Expected sentences by hand.
describe('kindOfText', () => {
	it('reads a tree as trees and a table as a matrix', () => {
		expect(kindOfText('(a:1,b:1);')).toBe('trees');
		expect(kindOfText('species,a,b\na,1,0.5\nb,0.5,1')).toBe('matrix');
		expect(kindOfText('species,a,b\na,0,221.1\nb,221.1,0')).toBe('covariate');
	});

	it('says of words that they are neither a tree nor a table', () => {
		const { code, message } = refusal('Dear all, please find the matrix of our frogs, as promised.');
		expect(code).toBe('no-material');
		expect(message).toContain('this text is neither');
		expect(message).toContain('begin with a bracket or #NEXUS');
	});

	it('takes words that open with a bracket for a tree, whose reader tells more', () => {
		expect(kindOfText('(as promised) the frogs')).toBe('trees');
	});

	it('refuses a word processor’s file', () => {
		expect(refusal('{\\rtf1\\ansi frogs}').code).toBe('rich-text');
	});
});
