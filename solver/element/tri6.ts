import type { ElementType } from './element-type';

/**
 * The 6-node triangle: corners L(2L − 1), midsides 4 L L. Midside 3 lies between corners 0 and 1, 4 between 1 and 2, 5 between
 * 2 and 0. Zienkiewicz & Taylor (2000), The Finite Element Method, vol. 1, ch. 8 (from memory).
 */
export const tri6: ElementType = {
  nodeCount: 6,
  degree: 2,
  shapeFunctions(xi, eta, N) {
    const l0 = 1 - xi - eta;
    N[0] = l0 * (2 * l0 - 1);
    N[1] = xi * (2 * xi - 1);
    N[2] = eta * (2 * eta - 1);
    N[3] = 4 * l0 * xi;
    N[4] = 4 * xi * eta;
    N[5] = 4 * eta * l0;
  },
  shapeGradients(xi, eta, dN) {
    const l0 = 1 - xi - eta;
    dN[0] = 1 - 4 * l0;
    dN[1] = 1 - 4 * l0;
    dN[2] = 4 * xi - 1;
    dN[3] = 0;
    dN[4] = 0;
    dN[5] = 4 * eta - 1;
    dN[6] = 4 * (l0 - xi);
    dN[7] = -4 * xi;
    dN[8] = 4 * eta;
    dN[9] = 4 * xi;
    dN[10] = -4 * eta;
    dN[11] = 4 * (l0 - eta);
  },
};
