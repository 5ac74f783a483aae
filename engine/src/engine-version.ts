/** Version of the engine: numbers kept with another one may differ in their last digits, or more. */
export const engineVersion = '0.1.0';
