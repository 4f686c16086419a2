/** Ends the session and loads the sign-in page afresh, so that nothing of the last person stays in memory. */
export function useSignOut(): (why?: 'idle', backTo?: string) => Promise<void> {
  const { signOut } = useAuth()
  return async (why, backTo) => {
    try {
      await signOut({ redirect: false })
    }
    finally {
      const query = new URLSearchParams({ ...(why ? { why } : {}), ...(backTo ? { next: backTo } : {}) }).toString()
      await navigateTo(`/sign-in${query ? `?${query}` : ''}`, { external: true })
    }
  }
}
