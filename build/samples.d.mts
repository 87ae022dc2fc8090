export const samplesFolder: string;
export function sampleNames(): string[];
export function designSample(name: string, directory: string): void;
export function differences(expected: string, actual: string): string[];
