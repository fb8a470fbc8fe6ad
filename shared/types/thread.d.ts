/** A worker's entry: the function gives its file URL (see server/compute/thread-plugin.ts). */
declare module '*?thread' {
  const url: () => string
  export default url
}
