/** An invented customer and order, for previews and tests of every kind of mail. */
export const previewOrder = { contactName: 'Aoife Byrne', orderRef: 'OX-2417', title: 'Return spring for a valve lever' }
export const previewUrls = { quoteUrl: 'https://oxmere.example/quotes/OX-2417?key=preview', orderUrl: 'https://oxmere.example/account/orders/OX-2417', estimatingUrl: 'https://oxmere.example/estimating/OX-2417' }
export const previewQuote = {
  ...previewOrder, quoteUrl: previewUrls.quoteUrl, revision: 'A', validUntil: '2026-12-31', currency: 'eur' as const, springWords: '1.6 mm wire, 18 mm outside, 60 mm long, 8 working coils', noteToCustomer: '',
  ladder: [{ quantity: 100, unitPrice: '2.140', grossMinor: 26_322 }, { quantity: 500, unitPrice: '0.960', grossMinor: 59_040 }, { quantity: 2_500, unitPrice: '0.612', grossMinor: 188_190 }],
}
