export { accounts } from './accounts';
export { exportJobs, exportState, type ExportOptions } from './export-jobs';
export { sessions } from './sessions';
export { studies } from './studies';
export { studyVersions } from './study-versions';
export { paperSize, userRole, users, valueNames } from './users';
export { verificationTokens } from './verification-tokens';
