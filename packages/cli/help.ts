/** What `--help` says. */

export const HELP = `oilway: reads hydraulic circuits as text, computes them and says what is wrong.

  oilway check [FILE or FOLDER ...]   findings of circuits; no path: this folder
  oilway run FILE                     step table, requirements and duty of the circuit's cycles
  oilway explain [CODE or WORD]       the page of a rule or of a word of the notation; alone: all of them

check
  --format text|json    text (default): each finding with its line of source; json: for other programs
  --accepted            show findings accepted by "allow" too
  --limit SECONDS       longest computation of one circuit (120)
  exit status: 0 nothing found (or for information only), 1 errors or warnings, 2 cannot run

run
  --format text|json|csv  text (default): tables; json, csv: the course over time in SI units
  --cycle NAME            only this cycle or manual function
  --limit SECONDS         longest computation (120)
  exit status: 0 all requirements met, 1 missed, not decided, a fault in the cycle or errors in the text, 2 cannot run

  --help, -h   this text        --version   the version

Examples
  oilway check                          every circuit below this folder
  oilway check press.oilway             one circuit
  oilway check --format json plant > findings.json
  oilway run press.oilway
  oilway run --format csv --cycle Stroke press.oilway > stroke.csv
  oilway explain A01
  oilway explain cylinder

Colours are used on a terminal only; NO_COLOR=1 turns them off.
Results are calculations from what was declared. Local codes, the standards named and a competent person decide.
`;
