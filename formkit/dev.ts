/** FormKit's numbered warnings spelt out; they are for its own development. */
export const register = () => undefined
