// Without decimal.ts on purpose: import that one by its own path where prices are made.
export { CURRENCY_CODES, currencyRow, isCurrency, type Currency } from './currencies'
export { addMoney, assertMinor, money, MoneyError, sumMinor, toCurrency, type Money, type MoneyErrorCode } from './money'
export { formatMoney, formatMoneyDifference, formatUnitPrice, groupThousands, minorToText, unitPriceDigits } from './format'
export { parseMoney } from './parse'
export { percentOfMinor } from './percent'
export { assertChargeable, LARGEST_CHARGE_MINOR, minimumChargeMinor, toChargeAmount } from './charge'
export { splitDeposit, type DepositSplit } from './deposit'
