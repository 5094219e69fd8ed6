/**
 * Passwords, and the words they are built from, that are tried first by whoever guesses: from memory of the published lists
 * of leaked passwords. A password is refused when nothing but digits and marks is left around one of them.
 */
const COMMON_WORDS = [
  'password', 'passwort', 'passw0rd', 'p4ssword', 'pa55word', 'motdepasse', 'wachtwoord', 'qwerty', 'qwertyuiop', 'qwertz', 'azerty', 'asdfgh', 'asdfghjkl', 'zxcvbn', 'zxcvbnm',
  'letmein', 'welcome', 'willkommen', 'bienvenue', 'iloveyou', 'sunshine', 'princess', 'football', 'baseball', 'basketball', 'monkey', 'dragon', 'master', 'shadow', 'superman',
  'batman', 'trustno', 'whatever', 'starwars', 'freedom', 'hello', 'charlie', 'donald', 'michael', 'jennifer', 'jordan', 'liverpool', 'chelsea', 'arsenal', 'admin', 'administrator',
  'login', 'access', 'secret', 'changeme', 'default', 'guest', 'root', 'test', 'user', 'demo', 'abc', 'abcd', 'abcdef', 'abcdefgh', 'computer', 'internet', 'samsung', 'google',
  'summer', 'winter', 'spring', 'autumn', 'january', 'february', 'october', 'december', 'monday', 'friday', 'ireland', 'dublin', 'cheese', 'flower', 'banana', 'pokemon', 'naruto',
]
/** Words that anybody who knows where the account is would try. */
const CONTEXT_WORDS = ['oxmere', 'wirewright', 'springs', 'springworks', 'oxmerespringworks', 'order', 'orders', 'estimator', 'supervisor', 'operator', 'bookkeeper', 'customer', 'coiling']

const lettersOf = (text: string) => text.toLowerCase().normalize('NFKD').replace(/[^\p{L}]/gu, '')
/** Letters that people swap for digits and marks. */
const unswapped = (text: string) => text.toLowerCase().replace(/[0@1!$357]/g, sign => ({ '0': 'o', '@': 'a', '1': 'l', '!': 'i', '$': 's', '3': 'e', '5': 's', '7': 't' })[sign] ?? sign)

function isSequence(password: string): boolean {
  const codes = [...password].map(sign => sign.codePointAt(0) ?? 0)
  const steps = new Set(codes.slice(1).map((code, index) => code - (codes[index] ?? 0)))
  // 11111111, 12345678, hgfedcba and 1234567890, whose one odd step is at its end.
  return steps.size === 1 ? Math.abs([...steps][0]!) <= 1 : /^(0?123456789?0?)+$|^(\d\d?)\2+$/.test(password)
}

/**
 * True for a password that a guesser would try early: a common word, the firm's or the person's own name or address, with or
 * without digits around it, one character again and again, or a run such as 12345678.
 */
export function isCommonPassword(password: string, person: { name: string, email: string, companyName?: string | null }): boolean {
  if (isSequence(password) || new Set([...password.toLowerCase()]).size <= 2) return true
  const own = [...person.name.split(/\s+/), person.name, ...person.email.split(/[@.+_-]/), person.email, person.companyName ?? ''].map(lettersOf).filter(word => word.length >= 3)
  const words = new Set([...COMMON_WORDS, ...CONTEXT_WORDS, ...own])
  return [password, unswapped(password)].map(lettersOf).some((letters) => {
    if (letters.length === 0) return password.length < 12
    if (words.has(letters)) return true
    // The same word twice, or two of them side by side.
    for (let cut = 3; cut <= letters.length - 3; cut += 1) {
      if (words.has(letters.slice(0, cut)) && words.has(letters.slice(cut))) return true
    }
    return false
  })
}
