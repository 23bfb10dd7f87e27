import { describe, expect, it } from 'vitest';
import { withGuesses } from './withGuesses.ts';

// Expected answers by hand.
describe('withGuesses', () => {
	it('leaves the measure open where nothing tells it', () => {
		expect(withGuesses({ name: '', fields: {} }, null)).toEqual({ measure: '' });
	});

	it('proposes the measure and the unit of what is replaced', () => {
		expect(withGuesses({ name: '', fields: {} }, { measure: 'pianka' })).toEqual({ measure: 'pianka' });
		expect(withGuesses({ name: '', fields: {} }, { ageUnit: 'ka' })).toEqual({ measure: '', ageUnit: 'ka' });
	});

	it('believes the name of the file before what is replaced', () => {
		expect(withGuesses({ name: 'warren.csv', fields: {} }, { measure: 'pianka' })['measure']).toBe('warren-i');
	});

	it('leaves every answer as it was given, an emptied one too', () => {
		const fields = { measure: '', ageUnit: 'Ma', scale: 'percent' };
		expect(withGuesses({ name: 'warren.csv', fields }, { measure: 'pianka', ageUnit: 'ka' })).toEqual(fields);
	});
});
