/** Version of the engine, stated in every result; changes whenever a number can. */
export const engineVersion = '0.1.0';
