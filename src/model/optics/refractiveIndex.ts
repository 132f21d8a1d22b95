/** Complex refractive index n + ik, relative to air (taken as 1). */
export interface RefractiveIndex {
  n: number
  k: number
}
