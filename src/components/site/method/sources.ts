/** Published sources of what the site computes, and what each is used for. */
export const SOURCES = [
  {
    key: "epdl97",
    citation:
      "Cullen, Hubbell, Kissel: EPDL97, the Evaluated Photon Data Library, 1997 version. UCRL-50400 Vol. 6 Rev. 5 (1997).",
    use: "Cross sections; f2, and f1 through the dispersion integral.",
  },
  {
    key: "henke93",
    citation: "Henke, Gullikson, Davis: At. Data Nucl. Data Tables 54, 181 (1993).",
    use: "Second table for spread; the relativistic term of Z*.",
  },
  {
    key: "chantler95",
    citation: "Chantler: J. Phys. Chem. Ref. Data 24, 71 (1995).",
    use: "Third table for spread.",
  },
  {
    key: "larkins77",
    citation: "Larkins: At. Data Nucl. Data Tables 20, 311 (1977).",
    use: "Binding energies: where edges lie.",
  },
  {
    key: "eadl97",
    citation: "EADL97, the Evaluated Atomic Data Library, 1997 version. After UCRL-50400 Vol. 30 (1991).",
    use: "Fluorescence and Coster–Kronig yields, emission rates.",
  },
  {
    key: "codata22",
    citation: "CODATA 2022: Mohr et al., Rev. Mod. Phys. 97, 025002 (2025).",
    use: "Physical constants.",
  },
  {
    key: "iupac21",
    citation: "IUPAC, CIAAW: Prohaska et al., Pure Appl. Chem. 94, 573 (2022).",
    use: "Abridged standard atomic weights 2021.",
  },
  {
    key: "hubbell-seltzer",
    citation:
      "Hubbell, Seltzer: tables of X-ray mass attenuation and mass energy-absorption coefficients. NISTIR 5632 (1995).",
    use: "For comparison in tests only.",
  },
  {
    key: "berger-hubbell",
    citation: "Berger, Hubbell: photon cross sections. NBSIR 87-3597 (1987).",
    use: "For comparison in tests only.",
  },
  {
    key: "icru44",
    citation: "ICRU Report 44: Tissue Substitutes in Radiation Dosimetry and Measurement (1989).",
    use: "Compositions of tissues in the handbook.",
  },
  {
    key: "pogany97",
    citation: "Pogany, Gao, Wilkins: Rev. Sci. Instrum. 68, 2774 (1997).",
    use: "Contrast transfer of phase and attenuation over distance.",
  },
  {
    key: "cloetens99",
    citation: "Cloetens et al.: Appl. Phys. Lett. 75, 2912 (1999).",
    use: "Contrast transfer at several distances.",
  },
  {
    key: "icru54",
    citation: "ICRU Report 54: Medical Imaging – The Assessment of Image Quality (1996).",
    use: "Ideal and non-prewhitening observers.",
  },
  {
    key: "rose48",
    citation: "Rose: J. Opt. Soc. Am. 38, 196 (1948).",
    use: "Threshold of detection.",
  },
  {
    key: "paganin02",
    citation: "Paganin, Mayo, Gureyev, Miller, Wilkins: J. Microsc. 206, 33 (2002).",
    use: "Filter of single-material retrieval.",
  },
  {
    key: "nesterets14",
    citation: "Nesterets, Gureyev: J. Phys. D 47, 105402 (2014).",
    use: "Gains of retrieval, and their limit.",
  },
  {
    key: "kitchen17",
    citation: "Kitchen et al.: Sci. Rep. 7, 15953 (2017).",
    use: "Gains and dose reductions as measured.",
  },
  {
    key: "hegerl76",
    citation: "Hegerl, Hoppe: Z. Naturforsch. A 31, 1717 (1976).",
    use: "Sharing a dose out among projections.",
  },
  {
    key: "grodzins83",
    citation: "Grodzins: Nucl. Instrum. Methods 206, 541 (1983).",
    use: "The thickness that absorption likes best.",
  },
] as const;
