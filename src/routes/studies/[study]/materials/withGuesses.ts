import { guessMeasure } from './guessMeasure.ts';

type Answered = Readonly<Record<string, string>>;
/** What was answered about the material that a text shall replace. */
type Former = { readonly measure?: string; readonly ageUnit?: string } | null;

/** The answers given, and where none is: what the file’s name says of the measure, else what the replaced material was. */
export function withGuesses({ name, fields }: { name: string; fields: Answered }, former: Former): Record<string, string> {
	const { measure, ageUnit, ...rest } = fields;
	const unit = ageUnit ?? former?.ageUnit;
	return {
		...rest,
		...(unit === undefined ? {} : { ageUnit: unit }),
		measure: measure ?? guessMeasure(name) ?? former?.measure ?? ''
	};
}
