/** One stretch of a reference function: E in mV = Σ c_i t^i (+ a0·exp(a1·(t − a2)²)), t in °C. */
export type EmfPiece = {
  fromC: number;
  toC: number;
  coefficients: readonly number[];
  exponential?: readonly [number, number, number];
};

/** A published approximation t = Σ d_i E^i, good to about 0.05 °C: where the inverse starts from. */
export type InversePiece = { fromMV: number; toMV: number; coefficients: readonly number[] };

export type ThermocoupleFunction = { pieces: readonly EmfPiece[]; inverse: InversePiece };

export const THERMOCOUPLE_TYPES = ['K', 'J', 'T'] as const;
export type ThermocoupleType = (typeof THERMOCOUPLE_TYPES)[number];

/**
 * Reference functions on ITS-90, reference junction at 0 °C: IEC 60584-1:2013, the same as NIST Monograph 175 and
 * NIST SRD 60, from whose tables type_k.tab, type_j.tab and type_t.tab they are taken.
 */
export const THERMOCOUPLES: Record<ThermocoupleType, ThermocoupleFunction> = {
  K: {
    pieces: [
      {
        fromC: -270,
        toC: 0,
        coefficients: [
          0, 0.39450128025e-1, 0.23622373598e-4, -0.32858906784e-6, -0.49904828777e-8,
          -0.67509059173e-10, -0.57410327428e-12, -0.31088872894e-14, -0.10451609365e-16,
          -0.19889266878e-19, -0.16322697486e-22,
        ],
      },
      {
        fromC: 0,
        toC: 1372,
        coefficients: [
          -0.17600413686e-1, 0.38921204975e-1, 0.18558770032e-4, -0.99457592874e-7,
          0.31840945719e-9, -0.56072844889e-12, 0.56075059059e-15, -0.32020720003e-18,
          0.97151147152e-22, -0.12104721275e-25,
        ],
        exponential: [0.1185976, -0.1183432e-3, 126.9686],
      },
    ],
    inverse: {
      fromMV: 0,
      toMV: 20.644,
      coefficients: [
        0, 2.508355e1, 7.860106e-2, -2.503131e-1, 8.31527e-2, -1.228034e-2, 9.804036e-4,
        -4.41303e-5, 1.057734e-6, -1.052755e-8,
      ],
    },
  },
  J: {
    pieces: [
      {
        fromC: -210,
        toC: 760,
        coefficients: [
          0, 0.50381187815e-1, 0.3047583693e-4, -0.8568106572e-7, 0.13228195295e-9,
          -0.17052958337e-12, 0.20948090697e-15, -0.12538395336e-18, 0.15631725697e-22,
        ],
      },
    ],
    inverse: {
      fromMV: 0,
      toMV: 42.919,
      coefficients: [
        0, 1.978425e1, -2.001204e-1, 1.036969e-2, -2.549687e-4, 3.585153e-6, -5.344285e-8,
        5.09989e-10,
      ],
    },
  },
  T: {
    pieces: [
      {
        fromC: -270,
        toC: 0,
        coefficients: [
          0, 0.38748106364e-1, 0.44194434347e-4, 0.11844323105e-6, 0.20032973554e-7,
          0.90138019559e-9, 0.22651156593e-10, 0.36071154205e-12, 0.38493939883e-14,
          0.28213521925e-16, 0.14251594779e-18, 0.48768662286e-21, 0.1079553927e-23,
          0.13945027062e-26, 0.79795153927e-30,
        ],
      },
      {
        fromC: 0,
        toC: 400,
        coefficients: [
          0, 0.38748106364e-1, 0.3329222788e-4, 0.20618243404e-6, -0.21882256846e-8,
          0.10996880928e-10, -0.30815758772e-13, 0.4547913529e-16, -0.27512901673e-19,
        ],
      },
    ],
    inverse: {
      fromMV: 0,
      toMV: 20.872,
      coefficients: [
        0, 2.5928e1, -7.602961e-1, 4.637791e-2, -2.165394e-3, 6.048144e-5, -7.293422e-7,
      ],
    },
  },
};
