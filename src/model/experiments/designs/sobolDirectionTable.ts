/**
 * Primitive polynomials and first direction numbers of the Sobol sequence from its second dimension on, after Joe and
 * Kuo 2008, from memory; equal to those of scipy 1.17 (stats.qmc.Sobol), compared entry by entry.
 *
 * degree s, coefficients a (the binary digits a_1 ... a_(s-1) of the polynomial x^s + a_1 x^(s-1) + ... + 1),
 * and m_1 ... m_s.
 */
export const sobolDirectionTable: readonly {
  degree: number
  coefficients: number
  first: readonly number[]
}[] = [
  { degree: 1, coefficients: 0, first: [1] },
  { degree: 2, coefficients: 1, first: [1, 3] },
  { degree: 3, coefficients: 1, first: [1, 3, 1] },
  { degree: 3, coefficients: 2, first: [1, 1, 1] },
  { degree: 4, coefficients: 1, first: [1, 1, 3, 3] },
  { degree: 4, coefficients: 4, first: [1, 3, 5, 13] },
  { degree: 5, coefficients: 2, first: [1, 1, 5, 5, 17] },
  { degree: 5, coefficients: 4, first: [1, 1, 5, 5, 5] },
  { degree: 5, coefficients: 7, first: [1, 1, 7, 11, 19] },
  { degree: 5, coefficients: 11, first: [1, 1, 5, 1, 1] },
  { degree: 5, coefficients: 13, first: [1, 1, 1, 3, 11] },
  { degree: 5, coefficients: 14, first: [1, 3, 5, 5, 31] },
  { degree: 6, coefficients: 1, first: [1, 3, 3, 9, 7, 49] },
  { degree: 6, coefficients: 13, first: [1, 1, 1, 15, 21, 21] },
  { degree: 6, coefficients: 16, first: [1, 3, 1, 13, 27, 49] },
  { degree: 6, coefficients: 19, first: [1, 1, 1, 15, 7, 5] },
  { degree: 6, coefficients: 22, first: [1, 3, 1, 15, 13, 25] },
  { degree: 6, coefficients: 25, first: [1, 1, 5, 5, 19, 61] },
  { degree: 7, coefficients: 1, first: [1, 3, 7, 11, 23, 15, 103] },
  { degree: 7, coefficients: 4, first: [1, 3, 7, 13, 13, 15, 69] },
  { degree: 7, coefficients: 7, first: [1, 1, 3, 13, 7, 35, 63] },
  { degree: 7, coefficients: 8, first: [1, 3, 5, 9, 1, 25, 53] },
  { degree: 7, coefficients: 14, first: [1, 3, 1, 13, 9, 35, 107] },
  { degree: 7, coefficients: 19, first: [1, 3, 1, 5, 27, 61, 31] },
  { degree: 7, coefficients: 21, first: [1, 1, 5, 11, 19, 41, 61] },
  { degree: 7, coefficients: 28, first: [1, 3, 5, 3, 3, 13, 69] },
  { degree: 7, coefficients: 31, first: [1, 1, 7, 13, 1, 19, 1] },
  { degree: 7, coefficients: 32, first: [1, 3, 7, 5, 13, 19, 59] },
  { degree: 7, coefficients: 37, first: [1, 1, 3, 9, 25, 29, 41] },
  { degree: 7, coefficients: 41, first: [1, 3, 5, 13, 23, 1, 55] },
  { degree: 7, coefficients: 42, first: [1, 3, 7, 3, 13, 59, 17] },
]
