declare module '#api-routes' {
  const routes: readonly { method: string, path: string }[]
  export default routes
}
