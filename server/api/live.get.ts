/** Liveness: the process answers. It says nothing about the database. */
export default defineRoute({ access: 'public' }, () => ({ status: 'alive' }))
