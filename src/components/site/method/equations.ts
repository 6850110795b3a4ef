/** The equations of the method page in reading order: TeX, how each part is read aloud, and what its symbols are. */
import type { Equation } from "./equation.ts";
import { CONTRAST_EQUATIONS } from "./equations-contrast.ts";
import { USE_EQUATIONS } from "./equations-uses.ts";

export type { Equation } from "./equation.ts";

const tex = String.raw;

export const EQUATIONS = {
  index: {
    parts: [{ tex: tex`n = 1 - \delta + i\beta`, spoken: "n equals 1 minus delta plus i beta" }],
  },
  delta: {
    parts: [
      {
        tex: tex`\delta = \frac{r_{\mathrm e} \lambda^2}{2\pi} \sum_i n_i f_{1,i}`,
        spoken: "delta equals r e lambda squared over two pi, times the sum over i of n i f 1 i",
      },
      {
        tex: tex`n_i = \frac{\rho N_{\mathrm A} w_i}{M_i}`,
        spoken: "n i equals rho times N A times w i over M i",
      },
    ],
    where: [
      [tex`r_{\mathrm e}`, "classical electron radius"],
      [tex`n_i`, "atoms of element i per volume"],
      [tex`\rho`, "density"],
      [tex`w_i, M_i`, "share of the mass and standard atomic weight of element i"],
      [tex`N_{\mathrm A}`, "Avogadro constant"],
    ],
  },
  beta: {
    parts: [
      {
        tex: tex`\beta = \frac{r_{\mathrm e} \lambda^2}{2\pi} \sum_i n_i f_{2,i}`,
        spoken: "beta equals r e lambda squared over two pi, times the sum over i of n i f 2 i",
      },
    ],
  },
  wavelength: {
    parts: [{ tex: tex`\lambda = \frac{h c}{E}`, spoken: "lambda equals h c over E" }],
  },
  phaseShift: {
    parts: [
      {
        tex: tex`\frac{\varphi}{t} = \frac{2\pi\delta}{\lambda}`,
        spoken: "phi over t equals two pi delta over lambda",
      },
      { tex: tex`t_{2\pi} = \frac{\lambda}{\delta}`, spoken: "t two pi equals lambda over delta" },
    ],
  },
  criticalAngle: {
    parts: [
      { tex: tex`\theta_{\mathrm c} \approx \sqrt{2\delta}`, spoken: "theta c is about the square root of two delta" },
    ],
  },
  electronDensity: {
    parts: [
      {
        tex: tex`n_{\mathrm e} = \rho N_{\mathrm A} \sum_i \frac{w_i Z_i}{M_i}`,
        spoken: "n e equals rho N A times the sum over i of w i Z i over M i",
      },
    ],
    where: [[tex`Z_i`, "atomic number of element i"]],
  },
  mu: {
    parts: [
      {
        tex: tex`\mu_{\mathrm{photo}} = \frac{4\pi\beta}{\lambda}`,
        spoken: "mu photo equals four pi beta over lambda",
      },
      {
        tex: tex`\mu = \sum_i n_i \left(\sigma_{\mathrm{photo}} + \sigma_{\mathrm{coh}} + \sigma_{\mathrm{inc}}\right)_i`,
        spoken: "mu equals the sum over i of n i times sigma photo plus sigma coherent plus sigma incoherent of i",
      },
    ],
    where: [[tex`\sigma`, "cross section per atom: photoelectric, coherent, incoherent"]],
  },
  betaEffective: {
    parts: [
      {
        tex: tex`\beta_{\mathrm{eff}} = \frac{\mu \lambda}{4\pi}`,
        spoken: "beta eff equals mu lambda over four pi",
      },
    ],
  },
  transmission: {
    parts: [
      { tex: tex`T = e^{-\mu t}`, spoken: "T equals e to the minus mu t" },
      { tex: tex`t = -\frac{\ln T}{\mu}`, spoken: "t equals minus the logarithm of T over mu" },
      { tex: tex`t_{1/2} = \frac{\ln 2}{\mu}`, spoken: "t one half equals the logarithm of 2 over mu" },
    ],
  },
  energyAbsorption: {
    parts: [
      {
        tex: tex`\mu_{\mathrm{en}} \approx \sum_i n_i \Bigl(\sigma_{\mathrm{photo}} - \sum_s \sigma_s \frac{F_s}{E} + \sigma_{\mathrm{inc}} f_{\mathrm{KN}}\Bigr)_i`,
        spoken:
          "mu e n is about the sum over i of n i times: sigma photo, minus the sum over shells s of sigma s F s over E, plus sigma incoherent f K N, of i",
      },
    ],
    where: [
      [tex`\sigma_s`, "photoelectric cross section of shell s: K, L1, L2, L3"],
      [tex`F_s`, "mean fluorescence energy that leaves after a vacancy in shell s"],
      [tex`f_{\mathrm{KN}}`, "mean share of the energy that the electron takes, after Klein and Nishina"],
    ],
  },
  fluorescenceL: {
    parts: [
      {
        tex: tex`F_{L3} = \omega_{L3} (B_{L3} - B_{M5})`,
        spoken: "F L3 equals omega L3 times B L3 minus B M5",
      },
      {
        tex: tex`F_{L2} = \omega_{L2} (B_{L2} - B_{M5}) + f_{23} F_{L3}`,
        spoken: "F L2 equals omega L2 times B L2 minus B M5, plus f 23 F L3",
      },
      {
        tex: tex`F_{L1} = \omega_{L1} (B_{L1} - B_{M1}) + f_{12} F_{L2} + f_{13} F_{L3}`,
        spoken: "F L1 equals omega L1 times B L1 minus B M1, plus f 12 F L2, plus f 13 F L3",
      },
    ],
    where: [
      [tex`\omega, f`, "fluorescence and Coster–Kronig yields"],
      [tex`B`, "binding energies"],
    ],
  },
  fluorescenceK: {
    parts: [
      {
        tex: tex`F_K = \omega_K S_K + (1 - \omega_K) \, 1.6 \, F_{L3}`,
        spoken: "F K equals omega K S K, plus 1 minus omega K, times 1.6 F L3",
      },
      {
        tex: tex`S_K = \sum_{j=2,3} r_{KLj} (B_K - B_{Lj} + F_{Lj})`,
        spoken: "S K equals the sum over j equal 2 and 3 of r K L j times B K minus B L j plus F L j",
      },
      {
        tex: tex`{} + r_{KM} (B_K - B_{M1}) + r_{\mathrm{KN}} B_K`,
        spoken: "plus r K M times B K minus B M1, plus r K N B K",
      },
    ],
    where: [[tex`r`, "shares of the K emission; the last holds N and all higher shells"]],
  },
  gamma: {
    parts: [
      {
        tex: tex`\gamma = \frac{\Delta\delta}{\Delta\beta_{\mathrm{eff}}}`,
        spoken: "gamma equals delta delta over delta beta eff",
      },
      {
        tex: tex`\Delta\beta_{\mathrm{eff}} = \frac{\Delta\mu \, \lambda}{4\pi}`,
        spoken: "delta beta eff equals delta mu lambda over four pi",
      },
    ],
  },
  mixtures: {
    parts: [
      {
        tex: tex`w_k \propto \phi_k \rho_k`,
        spoken: "by volume, w k is proportional to phi k rho k",
      },
      { tex: tex`w_k \propto x_k M_k`, spoken: "by mole, w k is proportional to x k M k" },
      { tex: tex`w_k = \frac{c_k}{\rho}`, spoken: "by concentration, w k equals c k over rho" },
    ],
    where: [
      [tex`w_k`, "share of part k by mass"],
      [tex`\phi_k`, "share by volume"],
      [tex`x_k`, "share by mole"],
      [tex`c_k`, "mass of the solute per volume of solution"],
    ],
  },
  density: {
    parts: [
      {
        tex: tex`\frac{1}{\rho} = \sum_k \frac{w_k}{\rho_k}`,
        spoken: "one over rho equals the sum over k of w k over rho k",
      },
      {
        tex: tex`\rho = \sum_k c_k + \rho_s \Bigl(1 - \sum_k \frac{c_k}{\rho_k}\Bigr)`,
        spoken: "rho equals the sum of c k, plus rho s times 1 minus the sum of c k over rho k",
      },
    ],
    where: [[tex`\rho_s`, "density of the solvent"]],
  },
  f2: {
    parts: [
      {
        tex: tex`f_2(E) = \frac{\sigma_{\mathrm{photo}}(E)\, E}{2 r_{\mathrm e} h c}`,
        spoken: "f 2 of E equals sigma photo of E times E, over two r e h c",
      },
    ],
  },
  f1: {
    parts: [
      {
        tex: tex`f_1(E) = Z^{*} + \frac{2}{\pi} \, P \int_0^\infty \frac{\varepsilon f_2(\varepsilon)}{E^2 - \varepsilon^2} \, d\varepsilon`,
        spoken:
          "f 1 of E equals Z star plus two over pi times the principal value of the integral from 0 to infinity of epsilon f 2 of epsilon over E squared minus epsilon squared, d epsilon",
      },
      {
        tex: tex`Z^{*} = Z - \Bigl(\frac{Z}{82.5}\Bigr)^{2.37}`,
        spoken: "Z star equals Z minus Z over 82.5 to the power 2.37",
      },
    ],
  },
  segment: {
    parts: [
      {
        tex: tex`\int \frac{c + m\varepsilon}{E^2 - \varepsilon^2} d\varepsilon = \frac{c}{2E} \ln\left|\frac{E + \varepsilon}{E - \varepsilon}\right|`,
        spoken:
          "the integral of c plus m epsilon over E squared minus epsilon squared, d epsilon, equals c over two E times the logarithm of the modulus of E plus epsilon over E minus epsilon",
      },
      {
        tex: tex`{} - \frac{m}{2} \ln\left|E^2 - \varepsilon^2\right|`,
        spoken: "minus m over two times the logarithm of the modulus of E squared minus epsilon squared",
      },
    ],
  },
  ...CONTRAST_EQUATIONS,
  ...USE_EQUATIONS,
} as const satisfies Record<string, Equation>;

export type EquationKey = keyof typeof EQUATIONS;

const ORDER = Object.keys(EQUATIONS);

/** The number printed beside the equation, from 1. */
export function equationNumber(key: EquationKey): number {
  return ORDER.indexOf(key) + 1;
}
