/** Every page but the sign-in page needs somebody signed in; the page asked for is where they return to. */
export default defineNuxtRouteMiddleware((to) => {
  const { loggedIn } = useUserSession()
  if (to.path === '/sign-in') return loggedIn.value ? navigateTo(localPath(to.query.to)) : undefined
  if (!loggedIn.value) return navigateTo({ path: '/sign-in', query: to.path === '/' ? {} : { to: to.fullPath } })
})
