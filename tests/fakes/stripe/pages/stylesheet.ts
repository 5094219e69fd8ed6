/** Colours of the fake's pages; a test computes that every pair in use has enough contrast. */
export const PAGE_COLOURS = {
  ground: '#ffffff',
  text: '#1f2023',
  quiet: '#4b4d52',
  band: '#ececef',
  line: '#73757a',
  error: '#9b1c14',
  button: '#1f2023',
  buttonText: '#ffffff',
} as const

const { ground, text, quiet, band, line, error, button, buttonText } = PAGE_COLOURS

/** The one stylesheet of the fake's pages: plain, grey, its own. */
export const STYLESHEET = `*{box-sizing:border-box}
body{margin:0;background:${ground};color:${text};font:1rem/1.5 system-ui,sans-serif}
.notice{margin:0;padding:.75rem 1rem;background:${band};border-bottom:1px solid ${line};font-weight:600;text-align:center}
main{max-width:38rem;margin:0 auto;padding:1.5rem 1rem 3rem}
h1{font-size:1.75rem;line-height:1.2;margin:.25rem 0 1rem}
h2{font-size:1.125rem;margin:2rem 0 .5rem}
table{width:100%;border-collapse:collapse}
caption{text-align:left;font-weight:600;padding-bottom:.25rem}
th,td{padding:.5rem 0;border-bottom:1px solid ${line};text-align:left;vertical-align:top;font-weight:400}
th.amount,td.amount{text-align:right;white-space:nowrap;font-variant-numeric:tabular-nums}
tfoot th,tfoot td{font-weight:600}
.quiet{color:${quiet}}
fieldset{margin:1.5rem 0 0;padding:0;border:0;min-width:0}
legend{font-weight:600;padding:0;margin-bottom:.25rem}
.choice{display:flex;gap:.75rem;align-items:flex-start;padding:.625rem 0;border-bottom:1px solid ${line};min-height:2.75rem}
.choice input{flex:none;width:1.25rem;height:1.25rem;margin:.125rem 0 0;accent-color:${button}}
.choice span{display:block}
.field{margin-top:1rem}
.field label{display:block;font-weight:600}
.field input{width:100%;max-width:24rem;min-height:2.75rem;padding:.5rem;font:inherit;color:${text};background:${ground};border:1px solid ${line};border-radius:2px}
.field input[aria-invalid=true]{border:2px solid ${error}}
.short input{max-width:9rem}
details{margin-top:1rem}
.error{color:${error};font-weight:600;margin:.25rem 0 0}
.summary{border:2px solid ${error};padding:.75rem 1rem;margin:0 0 1.5rem}
.summary h2{margin:0 0 .25rem}
.summary p{margin:0}
button,.button{display:inline-block;min-height:3rem;padding:.75rem 1.25rem;margin:1.5rem .75rem 0 0;font:inherit;font-weight:600;border:1px solid ${button};border-radius:2px;background:${button};color:${buttonText};text-decoration:none;cursor:pointer}
button.second{background:${ground};color:${text}}
a{color:${text}}
:focus-visible{outline:3px solid ${text};outline-offset:2px}
.wrap{overflow-wrap:anywhere}
`
