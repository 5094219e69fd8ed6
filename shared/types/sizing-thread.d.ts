/** Source of the thread that sizes springs, made when the server is built. */
declare module '#sizing-thread' {
  const source: string
  export default source
}
