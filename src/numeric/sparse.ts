// Sparse matrices by column, the form in which the block projection matrix travels.

/** Compressed columns: the entries of column j stand at columnStart[j] to columnStart[j + 1], rows ascending, no zeros. */
export interface SparseMatrix {
  readonly rows: number;
  readonly columns: number;
  readonly columnStart: Int32Array;
  readonly rowIndex: Int32Array;
  readonly values: Float64Array;
}
