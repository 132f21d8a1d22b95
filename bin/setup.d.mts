/** Hash of all that the compiled program depends on. */
export function sourceHash(root: string): string
/** Whether `dist` was built from the sources as they are now. */
export function isBuildFresh(root: string): boolean
/** Whether every package of the lock file is installed in the locked version. */
export function isInstallComplete(root: string): boolean
