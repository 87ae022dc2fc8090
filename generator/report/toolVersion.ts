/** As package.json has it; a test holds the two equal. */
export const toolVersion = '0.1.0';
