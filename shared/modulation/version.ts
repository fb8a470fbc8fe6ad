/** Version of the numerical core. Part of every stored result's key: raise it whenever a number may change. */
export const coreVersion: string = '1.1.1'
