/** Equations of the method page on the use of images and the ranking: regimes, retrieval, tomography, verdict. */
import type { Equation } from "./equation.ts";

const tex = String.raw;

export const USE_EQUATIONS = {
  nearField: {
    parts: [
      {
        tex: tex`\chi_{\mathrm{res}} = \pi \lambda R' \, u_{\mathrm{res}}^2`,
        spoken: "chi res equals pi lambda R prime u res squared",
      },
    ],
    where: [
      [tex`\chi_{\mathrm{res}}`, "near-field measure: χ at the resolution limit"],
      [tex`u_{\mathrm{res}}`, "resolution limit"],
    ],
  },
  reversal: {
    parts: [
      {
        tex: tex`\cos\chi + \gamma \sin\chi = 0`,
        spoken: "cosine chi plus gamma sine chi equals 0",
      },
      {
        tex: tex`\chi_1 = \pi - \arctan\frac{1}{\gamma} \quad (\gamma > 0)`,
        spoken: "chi 1 equals pi minus the arc tangent of one over gamma, for gamma above 0",
      },
      {
        tex: tex`\chi_1 = \arctan\frac{1}{|\gamma|} \quad (\gamma < 0)`,
        spoken: "chi 1 equals the arc tangent of one over the modulus of gamma, for gamma below 0",
      },
    ],
    where: [[tex`\chi_1`, "first zero of the contrast"]],
  },
  retrievalFilter: {
    parts: [
      {
        tex: tex`t = -\frac{1}{\mu} \ln F^{-1}\left\{ H \cdot F\{I / I_0\} \right\}`,
        spoken:
          "t equals minus one over mu times the logarithm of the inverse Fourier transform of H times the transform of I over I 0",
      },
      {
        tex: tex`H = \frac{1}{1 + \gamma \chi}`,
        spoken: "H equals one over 1 plus gamma chi",
      },
    ],
    where: [
      [tex`t`, "thickness of the one material, or of the feature in its host"],
      [tex`\mu, \gamma`, "of the material, or Δμ and γ of the pair"],
      [tex`I / I_0`, "image over the image without sample; for a pair, over the host’s"],
      [tex`F`, "Fourier transform"],
    ],
  },
  retrievalSignal: {
    parts: [
      {
        tex: tex`S_{\mathrm{eff}} = \frac{\left[\int |\hat C H|^2\right]^2}{\int |\hat C H|^2 H^2}`,
        spoken:
          "S eff equals the integral of C hat H squared, squared, over the integral of C hat H squared times H squared",
      },
      { tex: tex`d'^2 = \eta \, n \, T \, S_{\mathrm{eff}}`, spoken: "d prime squared equals eta n T S eff" },
    ],
    where: [[tex`\textstyle\int`, "as in S, but from u = 1/(4 d) up; of a layer from 1/(4 w)"]],
  },
  gains: {
    parts: [
      {
        tex: tex`G_{2\mathrm D}^2 = \frac{(2 u_{\mathrm N})^2}{\iint H^2}`,
        spoken: "G 2 D squared equals two u N squared over the double integral of H squared",
      },
      {
        tex: tex`G_{\mathrm{CT}}^2 = \frac{\iint u_x^2}{\iint u_x^2 H^2}`,
        spoken:
          "G C T squared equals the double integral of u x squared over the double integral of u x squared times H squared",
      },
    ],
    where: [[tex`\textstyle\iint`, "over the square band of the pixels, both frequencies from −u_N to u_N"]],
  },
  gainLimits: {
    parts: [
      {
        tex: tex`G_{2\mathrm D} \approx \sqrt{\frac{\gamma}{N_{\mathrm F}}}`,
        spoken: "G 2 D is about the square root of gamma over N F",
      },
      {
        tex: tex`G_{\mathrm{CT}} \approx \frac{\gamma}{N_{\mathrm F}} \sqrt{\frac{\pi / 6}{\ln(\pi\gamma / 4 N_{\mathrm F}) - 1}}`,
        spoken:
          "G C T is about gamma over N F times the square root of pi over 6, over the logarithm of pi gamma over 4 N F minus 1",
      },
    ],
    where: [[tex`N_{\mathrm F}`, "Fresnel number of the pixel, p²/(λR′)"]],
  },
  contactContrast: {
    parts: [
      {
        tex: tex`\mathrm{CNR} = |\Delta\mu| \, d \sqrt{N}`,
        spoken: "C N R equals the modulus of delta mu times d times the square root of N",
      },
    ],
    where: [[tex`N`, "photons detected in a pixel of one image"]],
  },
  tomographySignal: {
    parts: [
      {
        tex: tex`S_{\mathrm{CT}} = \frac{\left[4\pi \int u^2 |\hat C H|^2 du\right]^2}{\pi^3 \int u^3 |\hat C H|^2 H^2 du}`,
        spoken:
          "for a sphere, S C T equals four pi times the integral of u squared C hat H squared, all squared, over pi cubed times the integral of u cubed C hat H squared times H squared",
      },
      {
        tex: tex`S_{\mathrm{CT}} = \ell \, \frac{\left[2\pi \int u |\hat C H|^2 du\right]^2}{2\pi^2 \int u^2 |\hat C H|^2 H^2 du}`,
        spoken:
          "for a fibre, S C T equals l times two pi times the integral of u C hat H squared, all squared, over two pi squared times the integral of u squared C hat H squared times H squared",
      },
    ],
    where: [[tex`S_{\mathrm{CT}}`, "signal of a sphere (first), of a fibre along the axis (second); from 0 to u_N"]],
  },
  tomographyLayer: {
    parts: [
      {
        tex: tex`S_{\mathrm{CT}} = \ell \, \frac{\left[\iint |\hat C H|^2\right]^2}{\pi \iint u_r |\hat C H|^2 H^2}`,
        spoken:
          "for a layer, S C T equals l times the double integral of C hat H squared, all squared, over pi times the double integral of u r C hat H squared times H squared",
      },
      {
        tex: tex`\hat t = d \, w \operatorname{sinc}(d u_x) \operatorname{sinc}(w u_y)`,
        spoken: "t hat equals d w sinc of d u x times sinc of w u y",
      },
    ],
    where: [
      [tex`u_x, u_y`, "frequencies in the slice, along the layer’s depth and its width"],
      [tex`u_r`, "√(u_x² + u_y²), up to u_N; MTF, χ and H are taken at it"],
    ],
  },
  projections: {
    parts: [
      {
        tex: tex`M_{\mathrm p} = \Bigl\lceil \frac{\pi}{2} \frac{L}{p} \Bigr\rceil`,
        spoken: "M p equals pi over 2 times L over p, rounded up",
      },
      {
        tex: tex`\sigma_\mu = \frac{\pi}{p \sqrt{12 \, M_{\mathrm p} N}}`,
        spoken: "sigma mu equals pi over p times the square root of 12 M p N",
      },
    ],
    where: [
      [tex`M_{\mathrm p}`, "projections, unless their number is set"],
      [tex`\sigma_\mu`, "noise of μ in a voxel of edge p, without retrieval"],
      [tex`N`, "photons detected in a pixel of one projection"],
    ],
  },
  advantage: {
    parts: [
      {
        tex: tex`A = \frac{Q_{\mathrm{abs}}}{Q_1}`,
        spoken: "A equals Q abs over Q 1",
      },
    ],
    where: [
      [tex`Q_1`, "objective of the first pick: dose, time or fluence"],
      [tex`Q_{\mathrm{abs}}`, "objective of absorption’s own best"],
    ],
  },
  densitySensitivity: {
    parts: [
      {
        tex: tex`s_\rho = \sqrt{s_A^2 + s_B^2}`,
        spoken: "s rho equals the square root of s A squared plus s B squared",
      },
      {
        tex: tex`s_i = \max_{\pm} \left| \frac{D(\rho_i \pm \Delta\rho_i)}{D(\rho_i)} - 1 \right|`,
        spoken:
          "s i equals the larger, for plus and minus, of the modulus of D at rho i plus or minus delta rho i over D at rho i, minus 1",
      },
    ],
    where: [
      [tex`s_\rho`, "density sensitivity, a share of the dose needed"],
      [tex`A, B`, "feature and host"],
      [tex`\Delta\rho_i`, "stated uncertainty of the density, 1 % unless stated"],
    ],
  },
  matched: {
    parts: [
      {
        tex: tex`s_{\Delta\delta} = \frac{\sqrt{(\delta_A r_A)^2 + (\delta_B r_B)^2}}{|\Delta\delta|}`,
        spoken:
          "s of delta delta equals the square root of delta A r A squared plus delta B r B squared, over the modulus of delta delta",
      },
    ],
    where: [
      [tex`s_{\Delta\delta}`, "share by which the stated densities move Δδ"],
      [tex`r_A, r_B`, "relative uncertainties of the densities of feature and host"],
    ],
  },
} as const satisfies Record<string, Equation>;
