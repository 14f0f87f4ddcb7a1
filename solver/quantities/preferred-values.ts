export type PreferredSeries = 'E3' | 'E6' | 'E12' | 'E24' | 'E48' | 'E96' | 'E192';

export declare function preferredValues(series: PreferredSeries): readonly number[];
export declare function nearestPreferred(value: number, series: PreferredSeries): number;
