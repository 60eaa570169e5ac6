// What the whole analysis is made from.
import type { BlockMatrix } from '../compile/block-matrix.ts';
import type { DenseMatrix, SparseMatrix } from '../numeric/sparse.ts';
import type { Answer } from './answer.ts';
import type { Against } from './difference-input.ts';
import type { SimulatedFall } from './falling.ts';
import type { LifeSplit } from './life-history.ts';
import type { Network } from './metapopulation-capacity.ts';
import type { LongRunGrowth } from '../results/results.ts';
import type { SmallNoise } from './small-noise.ts';
import type { LandSpeed } from './spread/model-spread.ts';
import type { YearMap } from './year-map.ts';

/** A named number of the model, and how the matrix moves with it. */
export interface ParameterTangent {
  readonly name: string;
  readonly value: number;
  /** ∂A/∂θ over the states of the matrix, the strength of crowding held. */
  readonly matrixTangent: SparseMatrix;
  /** The same where the strength of crowding is solved anew; missing where that makes no difference. */
  readonly solvedAnew?: SparseMatrix;
  /** False where differences were taken. True where it is missing. */
  readonly exact?: boolean;
}

/** Covariances of named parameters, in the order of `names`. */
export interface NamedCovariance {
  readonly names: readonly string[];
  readonly covariance: DenseMatrix;
}

/** Of a condition that depends on numbers: the least and the most over the patches. */
export interface FactorAtZero {
  readonly crowding: string;
  readonly least: number;
  readonly most: number;
}

/** All but the matrix may be missing; what then cannot be said comes out as null with the reason. */
export interface AnalysisInput {
  readonly block: BlockMatrix;
  /** Animals at count 0, by state of the matrix. */
  readonly start?: Float64Array;
  readonly split?: LifeSplit;
  /** Over the states of the matrix, where rates depend on numbers. */
  readonly yearMap?: YearMap;
  readonly parameterTangents?: readonly ParameterTangent[];
  /** Names whose slopes cannot be told, since the model allows no other number. */
  readonly withoutTangent?: readonly string[];
  /** Long-run growth with the variation of the years, by approximation. */
  readonly noise?: Answer<SmallNoise>;
  /** What is in the mean year, but not in the variation of the approximation. */
  readonly noiseLeavesOut?: readonly string[];
  /** Long-run growth near zero, simulated. */
  readonly simulatedGrowth?: Answer<LongRunGrowth>;
  /** Outcomes that are falls of freely drifting numbers, as runs found them. */
  readonly falls?: Answer<readonly SimulatedFall[]>;
  /** What conditions leave of the rates they act on near zero. */
  readonly factorsAtZero?: readonly FactorAtZero[];
  /** Rates or ways that are not those of the first year in every year. */
  readonly changesByYear?: boolean;
  /** Of what is not known. */
  readonly uncertainty?: Answer<NamedCovariance>;
  readonly network?: Answer<Network>;
  readonly spread?: Answer<readonly LandSpeed[]>;
  readonly against?: Answer<Against>;
  /** Nobody dies on the way in any dispersal. */
  readonly losslessDispersal?: boolean;
  /** The matrix is that of small changes around a make-up of the sexes. */
  readonly linearised?: boolean;
  readonly wantEigenvalues?: boolean;
  /** Years of the path from the start; 20 where not given. */
  readonly pathSteps?: number;
}
