/** One quantity: the names of the check file on both sides, product code between them. */
export type Quantity = (inputs: never) => object;
export type QuantityTable = Readonly<Record<string, Quantity>>;

/** One wavelength is a metre at this frequency, MHz, so that spacings in wavelengths are spacings in m. */
export const METRE_WAVE_MHZ = 299.792458;

export interface TaperInputs {
  taper: string;
  sll_db?: number;
  nbar?: number;
}
