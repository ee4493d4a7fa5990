import type { ElementType } from './element-type';

/** The 3-node triangle: N = (1 − ξ − η, ξ, η). Zienkiewicz & Taylor (2000), The Finite Element Method, vol. 1, ch. 8 (from memory). */
export const tri3: ElementType = {
  nodeCount: 3,
  degree: 1,
  shapeFunctions(xi, eta, N) {
    N[0] = 1 - xi - eta;
    N[1] = xi;
    N[2] = eta;
  },
  shapeGradients(_xi, _eta, dN) {
    dN[0] = -1;
    dN[1] = -1;
    dN[2] = 1;
    dN[3] = 0;
    dN[4] = 0;
    dN[5] = 1;
  },
};
