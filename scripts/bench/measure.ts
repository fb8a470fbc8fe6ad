/** One line of the table that `npm run bench` prints. */
export interface Row {
  what: string
  figure: number
  unit: string
  /** the largest figure that is good enough; null where there is no such limit */
  target: number | null
}

/** What a measurement finds running: a fresh database and built server with the demonstration data, where it needs one. */
export interface Context {
  /** address of the server, without a slash at its end */
  baseUrl: string
  databaseUrl: string
  dataDir: string
  accounts: { email: string, password: string, role: string }[]
  serverPid: number
  /** Chromium's program, for needs 'browser' */
  chromium: string
}

/** A measurement: the default export of a file in this folder. */
export type Measure
  = | { title: string, needs: 'core', run: () => Promise<Row[]> }
    | { title: string, needs: 'server' | 'browser', run: (context: Context) => Promise<Row[]> }
