import { describe, expect, it } from 'vitest';
import { hashPassphrase, passphraseFault, randomPassphrase, verifyPassphrase } from './passphrase.ts';

describe('passphraseFault', () => {
	// ASVS 6.2.1 and NIST SP 800-63B rev. 4: 15 characters when the passphrase is the only factor.
	it('asks for 15 characters and names how many came', () => {
		expect(passphraseFault('fourteen chars', [])).toContain('at least 15 characters; this one has 14.');
		expect(passphraseFault('fifteen chars!!', [])).toBeNull();
	});

	// ASVS 6.2.5: no composition rules.
	it('accepts words without digits, capitals or signs', () => {
		expect(passphraseFault('merrow lantern oyster', [])).toBeNull();
	});

	// ASVS 6.2.9: at least 64 characters allowed.
	it('accepts 128 characters and refuses 129', () => {
		const long = 'merrow lantern oyster quill '.repeat(5);
		expect(passphraseFault(long.slice(0, 128), [])).toBeNull();
		expect(passphraseFault(long.slice(0, 129), [])).toContain('at most 128 characters; this one has 129.');
	});

	it('counts characters as people see them, in any script', () => {
		expect(passphraseFault('山川風雪花鳥月星空海森林道橋門', [])).toBeNull();
		expect(passphraseFault('🦜'.repeat(14), [])).toContain('this one has 14');
	});

	it.each([
		'correct horse battery staple',
		'Password Password',
		'qwertyuiop123456',
		'aaaaaaaaaaaaaaaaaaaa',
		'The Quick Brown Fox'
	])('refuses a favourite: %s', (passphrase) => expect(passphraseFault(passphrase, [])).toContain('among the first'));

	it('refuses a passphrase that is mostly the name, the address or the site', () => {
		expect(passphraseFault('marguerite 1984 !', ['Marguerite Oake'])).toContain('mostly "marguerite"');
		expect(passphraseFault('kithlinekithline', [])).toContain('mostly "kithline"');
		expect(passphraseFault('marguerite paints lanterns', ['Marguerite Oake'])).toBeNull();
	});
});

describe('verifyPassphrase', () => {
	it('accepts exactly the passphrase that was kept: no trimming, cutting or folding', async () => {
		const kept = await hashPassphrase('Lantern  Öyster quill ');
		expect(await verifyPassphrase(kept, 'Lantern  Öyster quill ')).toBe(true);
		expect(await verifyPassphrase(kept, 'Lantern  Öyster quill')).toBe(false);
		expect(await verifyPassphrase(kept, 'lantern  öyster quill ')).toBe(false);
	});

	// OWASP Password Storage: argon2id, m = 19456 KiB, t = 2, p = 1.
	it('keeps an argon2id hash with the recommended cost', async () => {
		expect(await hashPassphrase('merrow lantern oyster')).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
	});

	it('refuses everything for an unknown account', async () => {
		expect(await verifyPassphrase(null, 'nobody has this one')).toBe(false);
	});
});

describe('randomPassphrase', () => {
	it('makes one that may be used, and another every time', () => {
		expect(passphraseFault(randomPassphrase(), [])).toBeNull();
		expect(randomPassphrase()).not.toBe(randomPassphrase());
	});
});
