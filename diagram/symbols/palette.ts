/** The product's colours, in one place: the theme of the screens and the exports both read them. Print is always `light`. */
export interface Palette {
  desk: string;
  behind: string;
  paper: string;
  ink: string;
  grey: string;
  hair: string;
  rule: string;
  red: string;
  blue: string;
  lane: string;
  row: string;
  marker: string;
  dead: string;
  ghost: string;
}

export const light: Palette = {
  desk: '#d9dedc',
  behind: '#e9ecea',
  paper: '#ffffff',
  ink: '#17242b',
  grey: '#5f6e74',
  hair: '#d3dadb',
  rule: '#9aa6aa',
  red: '#c4301c',
  blue: '#2a4fb0',
  lane: '#f5f8f6',
  row: '#eef2f0',
  marker: '#fbf0c6',
  dead: '#8b979b',
  ghost: '#6b7a80',
};

export const dark: Palette = {
  desk: '#0b151b',
  behind: '#16272f',
  paper: '#11222c',
  ink: '#dfe8ea',
  grey: '#8fa6b1',
  hair: '#274150',
  rule: '#56707e',
  red: '#ff7d66',
  blue: '#9fb8ff',
  lane: '#152a35',
  row: '#182d38',
  marker: '#4a4220',
  dead: '#6f8792',
  ghost: '#8fa6b1',
};

/** Core colours by IEC 60757 code, for each ground. Meaning never rests on them: dash and label tell the cores apart. */
export const cores: Record<'light' | 'dark', Record<string, string>> = {
  light: {
    BN: '#7a4a24',
    BU: '#1f66b8',
    BK: '#17242b',
    GY: '#6b767b',
    RD: '#b3261e',
    YE: '#8a6d00',
    GNYE: '#2f7a24',
    GN: '#2f7a24',
    OG: '#a8560a',
    VT: '#6a3fa0',
    PK: '#a8477a',
    WH: '#7d888c',
  },
  dark: {
    BN: '#e0a37a',
    BU: '#7fb2ea',
    BK: '#c3ced2',
    GY: '#9fb0b8',
    RD: '#ff8a7a',
    YE: '#e0c25a',
    GNYE: '#8fcf7a',
    GN: '#8fcf7a',
    OG: '#f0a860',
    VT: '#c0a3f0',
    PK: '#f0a0c8',
    WH: '#e8eef0',
  },
};
