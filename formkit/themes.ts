/** We style our own controls and draw our own icons. */
export const createThemePlugin = () => () => undefined
export const createIconHandler = () => () => undefined
