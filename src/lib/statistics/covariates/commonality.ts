/** How R² is shared out between age and all covariates together. */
export type Commonality = {
	/** R² that is lost when age leaves the regression */
	readonly age: number;
	/** R² that is lost when the covariates leave it */
	readonly covariates: number;
	/** R² that either explains as well; below 0 where each tells more beside the other than alone */
	readonly shared: number;
};

export type PartsOfRSquared = {
	readonly rSquared: number;
	readonly rSquaredOfAge: number;
	readonly rSquaredOfCovariates: number;
};

/**
 * The unique and shared parts of R², which add up to it. R² of pairs is no variance of the species behind them.
 * @see Legendre, Fortin & Borcard (2015), doi:10.1111/2041-210X.12425, on R² of distances
 */
export function commonality({ rSquared, rSquaredOfAge, rSquaredOfCovariates }: PartsOfRSquared): Commonality {
	return {
		age: Math.max(0, rSquared - rSquaredOfCovariates),
		covariates: Math.max(0, rSquared - rSquaredOfAge),
		shared: rSquaredOfAge + rSquaredOfCovariates - rSquared
	};
}
