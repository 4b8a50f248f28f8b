export const SCANNER_HEADERS: readonly { key: string; value: string }[];
declare const config: object;
export default config;
