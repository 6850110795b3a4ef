/** Equations of the method page on what an image of a pair shows, and at which dose: geometry, contrast, detectability. */
import type { Equation } from "./equation.ts";

const tex = String.raw;

export const CONTRAST_EQUATIONS = {
  geometry: {
    parts: [
      { tex: tex`M = \frac{R_1 + R_2}{R_1}`, spoken: "M equals R 1 plus R 2 over R 1" },
      { tex: tex`R' = \frac{R_2}{M}`, spoken: "R prime equals R 2 over M" },
      { tex: tex`p = \frac{p_{\mathrm{det}}}{M}`, spoken: "p equals p det over M" },
    ],
    where: [
      [tex`R_1`, "source to the middle of the sample; without end for a parallel beam"],
      [tex`R_2`, "middle of the sample to detector: the distance of a plan"],
      [tex`M, R'`, "magnification and effective distance"],
      [tex`p_{\mathrm{det}}, p`, "pixel of the detector, and as it falls on the sample"],
    ],
  },
  blur: {
    parts: [
      {
        tex: tex`\sigma^2 = \Bigl(\sigma_{\mathrm{src}} \frac{M - 1}{M}\Bigr)^2 + \Bigl(\frac{\sigma_{\mathrm{det}}}{M}\Bigr)^2`,
        spoken: "sigma squared equals sigma src times M minus 1 over M, squared, plus sigma det over M, squared",
      },
      {
        tex: tex`\mathrm{FWHM} = 2\sqrt{2 \ln 2} \, \sigma \approx 2.355 \, \sigma`,
        spoken:
          "F W H M equals two times the square root of two times the logarithm of 2, times sigma: about 2.355 sigma",
      },
    ],
    where: [
      [tex`\sigma`, "standard deviation of the blur, in the plane of the sample"],
      [tex`\sigma_{\mathrm{src}}`, "of the source, across the feature"],
      [tex`\sigma_{\mathrm{det}}`, "of screen and optics, without the pixel"],
    ],
  },
  systemTransfer: {
    parts: [
      {
        tex: tex`\mathrm{MTF}(u) = e^{-2\pi^2\sigma^2u^2} \left|\operatorname{sinc}(u p)\right|`,
        spoken:
          "M T F of u equals e to the minus two pi squared sigma squared u squared, times the modulus of sinc of u p",
      },
      { tex: tex`u_{\mathrm N} = \frac{1}{2p}`, spoken: "u N equals one over two p" },
    ],
    where: [
      [tex`u`, "spatial frequency in the plane of the sample"],
      [tex`\operatorname{sinc} x`, "sin πx / πx: the pixel"],
      [tex`u_{\mathrm N}`, "Nyquist frequency, the finest that pixels carry"],
    ],
  },
  fresnelNumbers: {
    parts: [
      {
        tex: tex`N_{\mathrm{res}} = \frac{\mathrm{FWHM}^2}{\lambda R'}`,
        spoken: "N res equals F W H M squared over lambda R prime",
      },
      {
        tex: tex`N_{\mathrm{feature}} = \frac{d_\perp^2}{\lambda R'}`,
        spoken: "N feature equals d across squared over lambda R prime",
      },
    ],
    where: [[tex`d_\perp`, "extent of the feature across the beam: diameter, or a layer’s width"]],
  },
  background: {
    parts: [
      {
        tex: tex`T = \exp\Bigl({-}\mu_B L - \sum_j \mu_j t_j\Bigr)`,
        spoken: "T equals the exponential of minus mu B L minus the sum over j of mu j t j",
      },
    ],
    where: [
      [tex`\mu_B, L`, "total attenuation and thickness of the host"],
      [tex`\mu_j, t_j`, "of each further layer: container, air, windows"],
    ],
  },
  contrastSpectrum: {
    parts: [
      {
        tex: tex`\hat C(u) = -\frac{4\pi}{\lambda} \left[\Delta\beta \cos\chi + \Delta\delta \sin\chi\right] \hat t(u) \, \mathrm{MTF}(u)`,
        spoken:
          "C hat of u equals minus four pi over lambda, times delta beta cosine chi plus delta delta sine chi, times t hat of u, times M T F of u",
      },
      { tex: tex`\chi = \pi \lambda R' \, u^2`, spoken: "chi equals pi lambda R prime u squared" },
    ],
    where: [
      [tex`\hat C`, "spectrum of the contrast, intensity over that of the host beside, minus 1"],
      [tex`\Delta\beta`, "difference of β_eff, feature minus host: Δμ λ/4π with the total μ"],
      [tex`\Delta\delta`, "difference of δ, feature minus host"],
      [tex`\chi`, "phase that propagation adds at this frequency"],
      [tex`\hat t`, "spectrum of the feature’s thickness along the beam"],
    ],
  },
  shapes: {
    parts: [
      {
        tex: tex`\hat t_{\mathrm{sphere}} = 4\pi a^3 \, \frac{\sin q - q \cos q}{q^3}`,
        spoken: "t hat of a sphere equals four pi a cubed times sine q minus q cosine q, over q cubed",
      },
      {
        tex: tex`\hat t_{\mathrm{fibre}} = \frac{a J_1(q)}{u}`,
        spoken: "t hat of a fibre equals a J 1 of q over u",
      },
      {
        tex: tex`\hat t_{\mathrm{layer}} = d \, w \operatorname{sinc}(w u)`,
        spoken: "t hat of a layer equals d w sinc of w u",
      },
    ],
    where: [
      [tex`a`, "radius, half the size d"],
      [tex`q`, "2πau"],
      [tex`J_1`, "Bessel function of the first kind, of order 1"],
      [tex`d, w`, "of a layer: size along the beam and width across it"],
    ],
  },
  bandwidth: {
    parts: [
      {
        tex: tex`\hat C(u) = \sum_k g_k \hat C(u; E_k)`,
        spoken: "C hat of u equals the sum over k of g k times C hat of u at E k",
      },
      {
        tex: tex`g_k \propto \exp\Bigl({-}\frac{(E_k - E)^2}{2 s^2 E^2}\Bigr)`,
        spoken: "g k is proportional to the exponential of minus E k minus E squared, over two s squared E squared",
      },
      { tex: tex`s = \frac{b}{2.355}`, spoken: "s equals b over 2.355" },
    ],
    where: [
      [tex`b`, "bandwidth: FWHM of the spectrum over its energy"],
      [tex`g_k`, "share of photons in part k, the sum of all being 1"],
    ],
  },
  detectability: {
    parts: [
      { tex: tex`d'^2 = \eta \, n \, T \, S`, spoken: "d prime squared equals eta n T S" },
      {
        tex: tex`S = 2\pi \int_0^{u_{\mathrm N}} |\hat C|^2 \, u \, du`,
        spoken: "for a sphere, S equals two pi times the integral from 0 to u N of C hat squared, u d u",
      },
      {
        tex: tex`S = 2 \ell \int_0^{u_{\mathrm N}} |\hat C|^2 \, du`,
        spoken: "for a fibre or layer, S equals two l times the integral from 0 to u N of C hat squared, d u",
      },
    ],
    where: [
      [tex`d'`, "detectability: signal over noise of the whole feature"],
      [tex`\eta`, "detector efficiency"],
      [tex`n`, "fluence, photons per area that enter the first layer, in the plane of the sample"],
      [tex`S`, "signal, an area: of a sphere (first) or of a fibre or layer (second)"],
      [tex`\ell`, "visible length of a fibre or layer"],
    ],
  },
  fluence: {
    parts: [
      {
        tex: tex`n = \max\Bigl(\frac{k^2}{\eta T S}, \; \frac{N_{\min}}{\eta T p^2}\Bigr)`,
        spoken: "n equals the larger of k squared over eta T S and N min over eta T p squared",
      },
      { tex: tex`N = \eta \, n \, T \, p^2`, spoken: "N equals eta n T p squared" },
    ],
    where: [
      [tex`k`, "threshold, 5 unless set"],
      [tex`N_{\min}`, "least counts in a pixel, 100 unless set; 0 switches the floor off"],
      [tex`N`, "photons detected in a pixel"],
    ],
  },
  efficiency: {
    parts: [
      {
        tex: tex`\eta(E) = 1 - e^{-\mu_{\mathrm{abs}} t}`,
        spoken: "eta of E equals 1 minus e to the minus mu abs t",
      },
      {
        tex: tex`\mu_{\mathrm{abs}} = \mu_{\mathrm{photo}} + \mu_{\mathrm{inc}}`,
        spoken: "mu abs equals mu photo plus mu incoherent",
      },
    ],
    where: [[tex`t`, "thickness of the scintillator or sensor"]],
  },
  planDose: {
    parts: [
      {
        tex: tex`n_{\mathrm h} = n \, e^{-\sum_{\mathrm{before}} \mu_j t_j}`,
        spoken: "n h equals n times e to the minus sum of mu j t j over the layers before",
      },
      {
        tex: tex`D = n_{\mathrm h} E \, \frac{\mu_{\mathrm{en},B}}{\rho_B}`,
        spoken: "D equals n h times E times mu e n of the host over rho of the host",
      },
      {
        tex: tex`\bar D = D \, \frac{1 - e^{-\mu_B L}}{\mu_B L}`,
        spoken: "D mean equals D times 1 minus e to the minus mu B L, over mu B L",
      },
      {
        tex: tex`D_A = n_{\mathrm h} E \, \frac{\mu_{\mathrm{en},A}}{\rho_A}`,
        spoken: "D of the feature equals n h times E times mu e n of the feature over rho of the feature",
      },
    ],
    where: [
      [tex`n_{\mathrm h}`, "fluence that enters the host, behind the layers before it"],
      [tex`D, \bar D`, "entrance dose of the host, and the mean over its depth"],
      [tex`D_A`, "dose of the feature, at the host’s entrance"],
      [tex`E`, "photon energy"],
    ],
  },
} as const satisfies Record<string, Equation>;
