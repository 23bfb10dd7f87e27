import type { CovariateReading } from '#lib/contracts/compute.ts';
import type { CovariateRequest } from '#lib/contracts/covariates.ts';
import { covariateFromBody, readCovariate, type CovariateMatrix } from '#lib/overlap/readCovariate.ts';
import { readPlaces } from '#lib/overlap/readPlaces.ts';
import { greatCircleDistances, sphericalCentroid } from '#lib/statistics/covariates/greatCircle.ts';
import { lowerTriangle } from '#lib/statistics/pairValues.ts';

/**
 * A covariate from what a person or a script brings: a matrix as text or numbers, or a table of places from which the
 * great-circle distances are computed. `scale: 'log'` takes ln(1 + value), so that a far pair counts little more than a
 * very far one and two species in one place stay at 0.
 *
 * @throws {InputError} those of `readCovariate`, `readPlaces`, `sphericalCentroid`
 */
export function readCovariateMaterial(request: Omit<CovariateRequest, 'label'>): CovariateReading {
	const read = request.places === undefined ? fromMatrix(request) : fromPlaces(request.places);
	if (request.scale === 'plain') return read;
	return { ...read, lower: read.lower.map(Math.log1p), reading: { ...read.reading, scale: 'log' } };
}

function fromMatrix({ matrix, csv, confirm }: Omit<CovariateRequest, 'label'>): CovariateReading {
	const read: CovariateMatrix = matrix === undefined ? readCovariate(csv ?? '', confirm) : covariateFromBody(matrix, confirm);
	const { species, values } = read.matrix;
	const reading = { source: 'matrix', kind: read.kind, scale: 'plain', unit: null, separator: read.separator } as const;
	return { species, lower: lowerTriangle(values, species.length), reading, remarks: read.remarks };
}

function fromPlaces(text: string): CovariateReading {
	const { species, points, separator, remarks } = readPlaces(text);
	const reading = { source: 'places', kind: 'distance', scale: 'plain', unit: 'km', separator } as const;
	return { species, lower: greatCircleDistances(points.map(sphericalCentroid)), reading, remarks };
}
