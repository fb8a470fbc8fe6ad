import type { Account } from '#shared/schemas/session'

/** Who is signed in, as a computed account (null: nobody), and the way out. */
export function useAccount() {
  const { user, session, fetch } = useUserSession()
  const account = computed(() => user.value as Account | null)
  const isAdmin = computed(() => account.value?.role === 'admin')

  const signOut = async () => {
    await useApi().delete('/api/session')
    session.value = null
    clearNuxtData()
    await navigateTo('/sign-in')
  }

  return { account, isAdmin, refresh: fetch, signOut }
}
