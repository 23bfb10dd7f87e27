import type { AnalysisResult } from './analysisResult.ts';

/** How the overlaps across a node are averaged: weighted by branching, or every pair equal. */
export type NodeAverage = 'nested' | 'plain';

/** Up to so many pairs of a node stand as dots, more as a strip. */
export const DOTS_AT_MOST = 12;
/** Above so many nodes only the largest means are drawn. */
export const ALL_DIAMONDS_UP_TO = 60;
export const LARGEST_DIAMONDS = 20;

/** The node means that a plate shows: those that were tested, else those weighted by branching. */
export function drawnAverage({ permutation }: { permutation: Pick<AnalysisResult['permutation'], 'statistic'> }): NodeAverage {
	return permutation.statistic === 'nodes-plain' ? 'plain' : 'nested';
}
