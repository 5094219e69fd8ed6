/** Ends the session here and on the server, and forgets what this device kept of the person. */
export function useSignOut() {
  const { signOut } = useAuth()
  const isLeaving = ref(false)

  async function leave(): Promise<void> {
    if (isLeaving.value) return
    isLeaving.value = true
    try {
      await signOut({ callbackUrl: '/sign-in' })
    }
    finally {
      sessionStorage.clear()
      isLeaving.value = false
    }
  }
  return { isLeaving: readonly(isLeaving), leave }
}
