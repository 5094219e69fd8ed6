/**
 * The order form is rendered once and kept under its address, query and all. It reads no query, so one that is added leads
 * to the plain address; else whoever makes up queries would fill the memory with copies of the page.
 */
export default defineEventHandler((event) => {
  if ((event.method === 'GET' || event.method === 'HEAD') && /^\/order\/?\?/.test(event.path)) return sendRedirect(event, '/order', 302)
})
