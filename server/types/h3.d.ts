declare module 'h3' {
  interface H3EventContext {
    requestId: string
    startedMs: number
    routeName: string
    actorId?: string
    /** What the renderer put around the body of the page: head and closing tags. */
    pageFrame?: string
  }
}
export {}
