import type { RandomNumbers } from './randomNumbers.ts';

const COARSEST_STEP = 48; // cells between the points of the coarsest lattice
const FINEST_STEP = 1.5;

/** Smooth hills without a name: lattices of normal deviates, each twice as fine and two thirds as high as the one before, added up. */
export function noiseField(columns: number, rows: number, random: RandomNumbers): Float64Array {
	const field = new Float64Array(columns * rows);
	let height = 1;
	for (let step = COARSEST_STEP; step >= FINEST_STEP; step /= 2) {
		const lattice = makeLattice(columns, rows, step, random);
		for (let cell = 0; cell < field.length; cell++) {
			field[cell] =
				(field[cell] ?? 0) + height * valueBetween(lattice, (cell % columns) / step, Math.floor(cell / columns) / step);
		}
		height /= 1.5;
	}
	return field;
}

type Lattice = { readonly width: number; readonly points: Float64Array };

function makeLattice(columns: number, rows: number, step: number, random: RandomNumbers): Lattice {
	const width = Math.ceil(columns / step) + 2;
	const depth = Math.ceil(rows / step) + 2;
	return { width, points: Float64Array.from({ length: width * depth }, random.normal) };
}

function valueBetween({ width, points }: Lattice, x: number, y: number): number {
	const left = Math.floor(x);
	const top = Math.floor(y);
	const point = (dx: number, dy: number): number => points[(top + dy) * width + left + dx] ?? 0;
	const across = eased(x - left);
	const upper = point(0, 0) + across * (point(1, 0) - point(0, 0));
	const lower = point(0, 1) + across * (point(1, 1) - point(0, 1));
	return upper + eased(y - top) * (lower - upper);
}

/** Flat at both ends, so that no crease shows along the lattice. */
function eased(share: number): number {
	return share * share * (3 - 2 * share);
}
