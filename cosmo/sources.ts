/**
 * The bibliography: one key a source. Entries hold only what was seen or is safely known (journal, volume, page or e-print
 * number); `memory` marks coefficients that were written down from memory and not compared with the page.
 */
export interface Source {
  readonly authors: string;
  readonly year: number;
  readonly title: string;
  /** Journal, volume and page, or the publishing body. */
  readonly reference: string;
  /** arXiv number. */
  readonly eprint?: string;
  /** True where what this program takes from the source was written down from memory. */
  readonly memory?: boolean;
}

const bibliography = {
  codata2010: {
    authors: "Mohr, Taylor & Newell",
    year: 2012,
    title: "CODATA recommended values of the fundamental physical constants: 2010",
    reference: "Rev. Mod. Phys. 84, 1527",
  },
  codata2014: {
    authors: "Mohr, Newell & Taylor",
    year: 2016,
    title: "CODATA recommended values of the fundamental physical constants: 2014",
    reference: "Rev. Mod. Phys. 88, 035009",
  },
  codata2018: {
    authors: "Tiesinga, Mohr, Newell & Taylor",
    year: 2021,
    title: "CODATA recommended values of the fundamental physical constants: 2018",
    reference: "Rev. Mod. Phys. 93, 025010",
  },
  codata2022: {
    authors: "Mohr, Newell, Taylor & Tiesinga",
    year: 2025,
    title: "CODATA recommended values of the fundamental physical constants: 2022",
    reference: "Rev. Mod. Phys. 97, 025002",
  },
  iau2012: {
    authors: "International Astronomical Union",
    year: 2012,
    title: "Resolution B2 on the re-definition of the astronomical unit of length",
    reference: "XXVIII General Assembly, Beijing",
  },
  iau2015: {
    authors: "International Astronomical Union",
    year: 2015,
    title: "Resolution B2 on recommended zero points for the absolute and apparent bolometric magnitude scales",
    reference: "XXIX General Assembly, Honolulu",
    eprint: "1510.06262",
  },
  ame2020: {
    authors: "Wang, Huang, Kondev, Audi & Naimi",
    year: 2021,
    title: "The AME 2020 atomic mass evaluation (II)",
    reference: "Chin. Phys. C 45, 030003",
    memory: true,
  },
  nistAsd: {
    authors: "Kramida, Ralchenko, Reader & NIST ASD Team",
    year: 2024,
    title: "NIST Atomic Spectra Database",
    reference: "National Institute of Standards and Technology, Gaithersburg",
  },
  fixsen2009: {
    authors: "Fixsen",
    year: 2009,
    title: "The temperature of the cosmic microwave background",
    reference: "ApJ 707, 916",
    eprint: "0911.1955",
  },
  bennett2021: {
    authors: "Bennett, Buldgen, de Salas, Drewes, Gariazzo, Pastor & Wong",
    year: 2021,
    title: "Towards a precision calculation of the effective number of neutrinos in the Standard Model. Part II",
    reference: "JCAP 04, 073",
    eprint: "2012.02726",
  },
  froustey2020: {
    authors: "Froustey, Pitrou & Volpe",
    year: 2020,
    title: "Neutrino decoupling including flavour oscillations and primordial nucleosynthesis",
    reference: "JCAP 12, 015",
    eprint: "2008.01074",
  },
  planck2015Parameters: {
    authors: "Planck Collaboration XIII",
    year: 2016,
    title: "Planck 2015 results. XIII. Cosmological parameters",
    reference: "A&A 594, A13",
    eprint: "1502.01589",
    memory: true,
  },
  planck2018Parameters: {
    authors: "Planck Collaboration VI",
    year: 2020,
    title: "Planck 2018 results. VI. Cosmological parameters",
    reference: "A&A 641, A6",
    eprint: "1807.06209",
  },
  hogg1999: {
    authors: "Hogg",
    year: 1999,
    title: "Distance measures in cosmology",
    reference: "arXiv e-print",
    eprint: "astro-ph/9905116",
  },
  chevallierPolarski2001: {
    authors: "Chevallier & Polarski",
    year: 2001,
    title: "Accelerating universes with scaling dark matter",
    reference: "Int. J. Mod. Phys. D 10, 213",
    eprint: "gr-qc/0009008",
  },
  linder2003: {
    authors: "Linder",
    year: 2003,
    title: "Exploring the expansion history of the Universe",
    reference: "Phys. Rev. Lett. 90, 091301",
    eprint: "astro-ph/0208512",
  },
  eisenstein2005: {
    authors: "Eisenstein et al.",
    year: 2005,
    title:
      "Detection of the baryon acoustic peak in the large-scale correlation function of SDSS luminous red galaxies",
    reference: "ApJ 633, 560",
    eprint: "astro-ph/0501171",
  },
  alcockPaczynski1979: {
    authors: "Alcock & Paczynski",
    year: 1979,
    title: "An evolution free test for non-zero cosmological constant",
    reference: "Nature 281, 358",
  },
  peebles1968: {
    authors: "Peebles",
    year: 1968,
    title: "Recombination of the primeval plasma",
    reference: "ApJ 153, 1",
  },
  zeldovich1968: {
    authors: "Zeldovich, Kurt & Sunyaev",
    year: 1968,
    title: "Recombination of hydrogen in the hot model of the Universe",
    reference: "Zh. Eksp. Teor. Fiz. 55, 278",
  },
  pequignot1991: {
    authors: "Pequignot, Petitjean & Boisson",
    year: 1991,
    title: "Total and effective radiative recombination coefficients",
    reference: "A&A 251, 680",
    memory: true,
  },
  goldman1989: {
    authors: "Goldman",
    year: 1989,
    title: "Generalized Laguerre representation: application to relativistic two-photon decays",
    reference: "Phys. Rev. A 40, 1185",
    memory: true,
  },
  drake1969: {
    authors: "Drake, Victor & Dalgarno",
    year: 1969,
    title: "Two-photon decay of the singlet and triplet metastable states of helium-like ions",
    reference: "Phys. Rev. 180, 25",
    memory: true,
  },
  stobbe1930: {
    authors: "Stobbe",
    year: 1930,
    title: "Zur Quantenmechanik photoelektrischer Prozesse",
    reference: "Ann. Phys. 399, 661",
    memory: true,
  },
  osterbrockFerland2006: {
    authors: "Osterbrock & Ferland",
    year: 2006,
    title: "Astrophysics of gaseous nebulae and active galactic nuclei",
    reference: "University Science Books, 2nd edition, eq. 2.4",
    memory: true,
  },
  seager1999: {
    authors: "Seager, Sasselov & Scott",
    year: 1999,
    title: "A new calculation of the recombination epoch",
    reference: "ApJ 523, L1",
    eprint: "astro-ph/9909275",
  },
  switzerHirata2008: {
    authors: "Switzer & Hirata",
    year: 2008,
    title: "Primordial helium recombination. I. Feedback, line transfer, and continuum opacity",
    reference: "Phys. Rev. D 77, 083006",
    eprint: "astro-ph/0702143",
    memory: true,
  },
  kholupenko2007: {
    authors: "Kholupenko, Ivanchik & Varshalovich",
    year: 2007,
    title: "He II to He I recombination in the early Universe",
    reference: "MNRAS 378, L39",
    eprint: "astro-ph/0703438",
    memory: true,
  },
  wong2008: {
    authors: "Wong, Moss & Scott",
    year: 2008,
    title: "How well do we understand cosmological recombination?",
    reference: "MNRAS 386, 1023",
    eprint: "0711.1357",
    memory: true,
  },
  thisProjectCalibration: {
    authors: "cosmology-cells",
    year: 2026,
    title: "Smooth Lyman-alpha correction of the calibrated tier, fitted by calibration/fit of this project",
    reference: "cosmo/recombination/calibrationCoefficients.json",
  },
  callin2006: {
    authors: "Callin",
    year: 2006,
    title: "How to calculate the CMB spectrum",
    reference: "arXiv e-print",
    eprint: "astro-ph/0606683",
  },
  lewis2008: {
    authors: "Lewis",
    year: 2008,
    title: "Cosmological parameters from WMAP 5-year temperature maps",
    reference: "Phys. Rev. D 78, 023002",
    eprint: "0804.3865",
  },
  kaiser1983: {
    authors: "Kaiser",
    year: 1983,
    title: "Small-angle anisotropy of the microwave background radiation in the adiabatic theory",
    reference: "MNRAS 202, 1169",
  },
  zaldarriagaHarari1995: {
    authors: "Zaldarriaga & Harari",
    year: 1995,
    title: "Analytic approach to the polarization of the cosmic microwave background in flat and open universes",
    reference: "Phys. Rev. D 52, 3276",
    eprint: "astro-ph/9504085",
  },
  huSugiyama1996: {
    authors: "Hu & Sugiyama",
    year: 1996,
    title: "Small-scale cosmological perturbations: an analytic approach",
    reference: "ApJ 471, 542",
    eprint: "astro-ph/9510117",
  },
  eisensteinHu1998: {
    authors: "Eisenstein & Hu",
    year: 1998,
    title: "Baryonic features in the matter transfer function",
    reference: "ApJ 496, 605",
    eprint: "astro-ph/9709112",
    memory: true,
  },
  aubourg2015: {
    authors: "Aubourg et al.",
    year: 2015,
    title: "Cosmological implications of baryon acoustic oscillation measurements",
    reference: "Phys. Rev. D 92, 123516",
    eprint: "1411.1074",
    memory: true,
  },
  brieden2023: {
    authors: "Brieden, Gil-Marin & Verde",
    year: 2023,
    title: "A tale of two (or more) h's",
    reference: "JCAP 04, 023, as quoted in arXiv:2503.14738",
    eprint: "2212.04522",
  },
  carroll1992: {
    authors: "Carroll, Press & Turner",
    year: 1992,
    title: "The cosmological constant",
    reference: "ARA&A 30, 499",
    memory: true,
  },
  pen1999: {
    authors: "Pen",
    year: 1999,
    title: "Analytical fit to the luminosity distance for flat cosmologies with a cosmological constant",
    reference: "ApJS 120, 49",
    eprint: "astro-ph/9904172",
  },
  komatsu2011: {
    authors: "Komatsu et al.",
    year: 2011,
    title: "Seven-year Wilkinson Microwave Anisotropy Probe observations: cosmological interpretation",
    reference: "ApJS 192, 18",
    eprint: "1001.4538",
  },
  hu2001: {
    authors: "Hu, Fukugita, Zaldarriaga & Tegmark",
    year: 2001,
    title: "Cosmic microwave background observables and their cosmological implications",
    reference: "ApJ 549, 669",
    eprint: "astro-ph/0006436",
    memory: true,
  },
  doranLilley2002: {
    authors: "Doran & Lilley",
    year: 2002,
    title: "The location of cosmic microwave background peaks in a universe with dark energy",
    reference: "MNRAS 330, 965",
    eprint: "astro-ph/0104486",
    memory: true,
  },
  jonesWyse1985: {
    authors: "Jones & Wyse",
    year: 1985,
    title: "The ionisation of the primeval plasma at the time of recombination",
    reference: "A&A 149, 144",
  },
  bond1997: {
    authors: "Bond, Efstathiou & Tegmark",
    year: 1997,
    title: "Forecasting cosmic parameter errors from microwave background anisotropy experiments",
    reference: "MNRAS 291, L33",
    eprint: "astro-ph/9702100",
  },
  planck1901: {
    authors: "Planck",
    year: 1901,
    title: "Ueber das Gesetz der Energieverteilung im Normalspectrum",
    reference: "Ann. Phys. 309, 553",
  },
  wien1893: {
    authors: "Wien",
    year: 1893,
    title: "Eine neue Beziehung der Strahlung schwarzer Korper zum zweiten Hauptsatz der Warmetheorie",
    reference: "Sitzungsber. Akad. Wiss. Berlin, 55",
  },
  cie2004: {
    authors: "International Commission on Illumination",
    year: 2004,
    title: "Colorimetry, 3rd edition",
    reference: "CIE 15:2004, table T.4 and illuminant A",
  },
  hairerWanner1999: {
    authors: "Hairer & Wanner",
    year: 1999,
    title: "Stiff differential equations solved by Radau methods",
    reference: "J. Comput. Appl. Math. 111, 93",
  },
  piessens1983: {
    authors: "Piessens, de Doncker-Kapenga, Uberhuber & Kahaner",
    year: 1983,
    title: "QUADPACK: a subroutine package for automatic integration",
    reference: "Springer, Berlin",
  },
  brent1973: {
    authors: "Brent",
    year: 1973,
    title: "Algorithms for minimization without derivatives",
    reference: "Prentice-Hall, Englewood Cliffs",
  },
} as const satisfies Record<string, Source>;

/** A key of the bibliography. */
export type SourceKey = keyof typeof bibliography;

/** The bibliography by key. */
export const sources: Readonly<Record<SourceKey, Source>> = bibliography;

/**
 * A source as one line of text; where the digits taken from it were written down from memory it says so.
 *
 * @example citation("hogg1999") // "Hogg 1999, arXiv e-print, arXiv:astro-ph/9905116"
 */
export function citation(key: SourceKey): string {
  const source = sources[key];
  const eprint = source.eprint === undefined ? "" : `, arXiv:${source.eprint}`;
  const memory = source.memory === true ? " (digits from memory)" : "";
  return `${source.authors} ${source.year}, ${source.reference}${eprint}${memory}`;
}
