import { NOT_FOUND } from './answering.ts';
import { Refusal } from './refusal.ts';

/** @throws {Refusal} 404 when it is not there */
export function found<Value>(value: Value | null): Value {
	if (value === null) throw new Refusal(404, 'not-found', NOT_FOUND);
	return value;
}
