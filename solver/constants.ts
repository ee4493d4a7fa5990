/** Unit weight of water, kN/m³ (fresh, about 10 °C; the customary value). */
export const waterUnitWeight = 9.81;
