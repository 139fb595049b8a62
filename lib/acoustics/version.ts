/** Counted up whenever a change of the computation changes its results: stored fits and plans name it. */
export const COMPUTATION_VERSION = 2;
