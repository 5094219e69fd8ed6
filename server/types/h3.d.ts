declare module 'h3' {
  interface H3EventContext {
    requestId: string
    startedMs: number
    routeName: string
    actorId?: string
  }
}
export {}
