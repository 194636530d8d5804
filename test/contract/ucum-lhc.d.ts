declare module '@lhncbc/ucum-lhc' {
  interface Conversion {
    readonly status: 'succeeded' | 'failed' | 'error';
    readonly toVal: number | null;
  }
  interface Utilities {
    convertUnitTo(from: string, value: number, to: string): Conversion;
    validateUnitString(code: string): { readonly status: string };
  }
  const ucum: { readonly UcumLhcUtils: { getInstance(): Utilities } };
  export default ucum;
}
