import { listPriceBooks } from '../../services/price-books/list'

export default defineRoute({ access: ['admin'] }, ({ context }) => listPriceBooks(context))
