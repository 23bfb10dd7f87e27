import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalHash, canonicalJson } from './analysisHash.ts';

describe('canonicalJson', () => {
	it('writes keys in order at every depth', () => {
		// by hand
		expect(canonicalJson({ b: [1, { d: null, c: 'x' }], a: 0.1 })).toBe('{"a":0.1,"b":[1,{"c":"x","d":null}]}');
	});

	it('leaves out what is undefined', () => {
		expect(canonicalJson({ a: undefined, b: 1 })).toBe('{"b":1}');
	});

	it('stays JSON of the same value', () => {
		fc.assert(
			fc.property(fc.jsonValue(), (value) => {
				expect(JSON.parse(canonicalJson(value))).toEqual(JSON.parse(JSON.stringify(value)));
			})
		);
	});
});

describe('canonicalHash', () => {
	it('does not depend on the order in which keys were written', () => {
		expect(canonicalHash({ treeSet: 't', seed: 1 })).toBe(canonicalHash({ seed: 1, treeSet: 't' }));
	});

	it('tells plans apart that differ in one choice', () => {
		expect(canonicalHash({ treeSet: 't', seed: 1 })).not.toBe(canonicalHash({ treeSet: 't', seed: 2 }));
	});

	it('is the SHA-256 of the text', () => {
		// `printf '{}' | sha256sum`
		expect(canonicalHash({})).toBe('44136fa355b3678a1146ad16f7e8649e94fb4fc21fe77e8310c060f61caaff8a');
	});
});
