/** The machine's-file thread, bundled at build time: its whole source as text. */
declare module '#machine-file-worker' {
  const source: string
  export default source
}
