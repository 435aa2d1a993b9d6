/** The colours of a chart, by what they are for. Apart from colour every kind of design also has a shape of its own. */

/** One set of colours; any value an SVG attribute takes. */
export interface ChartInk {
  readonly paper: string;
  readonly text: string;
  readonly quiet: string;
  readonly line: string;
  readonly front: string;
  readonly feasible: string;
  readonly removed: string;
  readonly reference: string;
  readonly proposal: string;
  /** Letters on the proposal's colour. */
  readonly onProposal: string;
}

/** For files and paper. Petrol against burnt orange stays apart for every common kind of colour blindness; text reaches 4.5 to 1 on white. */
export const fileInk: ChartInk = {
  paper: '#ffffff',
  text: '#1c2529',
  quiet: '#56636a',
  line: '#dfe4e6',
  front: '#12627a',
  feasible: '#7fa1af',
  removed: '#c4b19f',
  reference: '#5b3d8f',
  proposal: '#ab4408',
  onProposal: '#ffffff',
};

/** In the page: its style sheet gives each its value, light or dark. */
export const pageInk: ChartInk = {
  paper: 'var(--paper)',
  text: 'var(--text)',
  quiet: 'var(--quiet)',
  line: 'var(--line)',
  front: 'var(--front)',
  feasible: 'var(--feasible)',
  removed: 'var(--removed)',
  reference: 'var(--reference)',
  proposal: 'var(--proposal)',
  onProposal: 'var(--on-proposal)',
};
