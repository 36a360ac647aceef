const open = ['/sign-in', '/api-guide']

export default defineNuxtRouteMiddleware(async (to) => {
  const { load } = useSession()
  if (open.includes(to.path)) {
    if (to.path === '/sign-in' && (await load()).account) return navigateTo('/')
    return
  }
  const me = await load()
  if (!me.account) return navigateTo({ path: '/sign-in', query: to.fullPath === '/' ? {} : { next: to.fullPath } })
})
