import { toolVersion } from '../report/toolVersion.ts';

export const versionText = `counterslope ${toolVersion}\n`;
