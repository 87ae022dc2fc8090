/** As package.json has it; a test holds the two equal. */
export const version = '0.1.0';

export const versionText = `counterslope ${version}\n`;
