import packageJson from '../../package.json'

/** Version of the application. */
export const version: string = packageJson.version
