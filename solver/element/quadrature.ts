// Quadrature on the reference triangle (0,0) (1,0) (0,1) and on the reference line [−1, 1].

/** Points and weights of a rule that is exact up to `degree`. */
export interface QuadratureRule {
  /** Highest degree of polynomial integrated exactly. */
  readonly degree: number;
  /** xi, eta per point on the triangle (stride 2); xi per point on the line (stride 1). */
  readonly points: Float64Array;
  /** One per point; they add up to ½ on the triangle, 2 on the line. */
  readonly weights: Float64Array;
}

/** An orbit under the triangle's symmetries: barycentric a, b (c = 1 − a − b) and the weight of each of its points. */
type Orbit = readonly [a: number, b: number, weight: number];

// Dunavant (1985), "High degree efficient symmetrical Gaussian quadrature rules for the triangle", IJNME 21, tables I–II;
// the unit test holds every rule against the exact integrals of all monomials. Weights for area 1.
const orbits: Readonly<Record<number, readonly Orbit[]>> = {
  1: [[1 / 3, 1 / 3, 1]],
  2: [[2 / 3, 1 / 6, 1 / 3]],
  4: [
    [0.108103018168070227, 0.445948490915964886, 0.223381589678011466],
    [0.816847572980458513, 0.091576213509770743, 0.109951743655321868],
  ],
  6: [
    [0.501426509658179, 0.249286745170910421, 0.116786275726379366],
    [0.873821971016996, 0.063089014491502227, 0.050844906370206817],
    [0.053145049844816947, 0.310352451033784405, 0.082851075618373575],
  ],
};

/** Distinct points of an orbit: 1, 3 or 6. */
function expandOrbit([a, b]: Orbit): [number, number][] {
  const c = 1 - a - b;
  const all: [number, number][] = [
    [a, b],
    [b, c],
    [c, a],
    [b, a],
    [c, b],
    [a, c],
  ];
  const distinct: [number, number][] = [];
  for (const point of all) {
    if (!distinct.some(([x, y]) => Math.abs(x - point[0]) + Math.abs(y - point[1]) < 1e-9))
      distinct.push(point);
  }
  return distinct;
}

function makeTriangleRule(degree: number): QuadratureRule {
  const points: number[] = [];
  const weights: number[] = [];
  for (const orbit of orbits[degree]!) {
    for (const [xi, eta] of expandOrbit(orbit)) {
      points.push(xi, eta);
      weights.push(orbit[2] / 2);
    }
  }
  return { degree, points: Float64Array.from(points), weights: Float64Array.from(weights) };
}

const triangleRules = [1, 2, 4, 6].map(makeTriangleRule);

/**
 * Finds the smallest rule on the reference triangle that is exact up to a degree.
 *
 * @param degree - Degree of polynomial to integrate exactly, 0 … 6; a higher one gets the rule of degree 6.
 * @returns The rule; weights add up to ½.
 * @source Dunavant (1985), IJNME 21:1129–1148.
 */
export function triangleRule(degree: number): QuadratureRule {
  return triangleRules.find((rule) => rule.degree >= degree) ?? triangleRules.at(-1)!;
}

// Gauss–Legendre points (Abramowitz & Stegun 1964, table 25.4).
const r35 = Math.sqrt(3 / 5);
const lineRules: QuadratureRule[] = [
  { degree: 1, points: Float64Array.of(0), weights: Float64Array.of(2) },
  { degree: 3, points: Float64Array.of(-1 / Math.sqrt(3), 1 / Math.sqrt(3)), weights: Float64Array.of(1, 1) },
  { degree: 5, points: Float64Array.of(-r35, 0, r35), weights: Float64Array.of(5 / 9, 8 / 9, 5 / 9) },
];

/**
 * Finds the smallest Gauss rule on [−1, 1] that is exact up to a degree.
 *
 * @param degree - Degree of polynomial to integrate exactly, 0 … 5; a higher one gets the rule of degree 5.
 * @returns The rule; weights add up to 2.
 * @source Abramowitz & Stegun (1964), Handbook of Mathematical Functions, table 25.4.
 */
export function lineRule(degree: number): QuadratureRule {
  return lineRules.find((rule) => rule.degree >= degree) ?? lineRules.at(-1)!;
}
