import type { FilmKind } from '../../../shared-core/picture/film.ts';
import type { PictureOptions, PictureView } from '../../../shared-core/picture/options.ts';
import type { ColourBy, ColourMapName, Light } from '../../../shared-core/study/schema.ts';

/** A label as it is being typed. */
export interface LabelDraft {
  readonly raDeg: string;
  readonly decDeg: string;
  readonly redshift: string;
  readonly text: string;
}

export type SlabKind = 'offered' | 'declination' | 'greatCircle';

/** What the person has chosen on the bench; numbers as they are typed. */
export interface PictureChoices {
  readonly what: 'picture' | 'film';
  readonly filmKind: FilmKind;
  readonly filmSize: string;
  readonly seconds: string;
  readonly framesPerSecond: string;
  /** The field that a fly-along goes through, from 1. */
  readonly field: number;
  readonly view: PictureView;
  readonly size: string;
  /** Sheets of paper stand upright. */
  readonly upright: boolean;
  readonly ownWidthPx: string;
  readonly ownHeightPx: string;
  readonly dpi: string;
  readonly style: PictureOptions['style'];
  /** Null takes the study's; of the light, whatever is not named here. */
  readonly colourBy: ColourBy | null;
  readonly colourMap: ColourMapName | null;
  readonly light: Partial<Light>;
  readonly slab: SlabKind;
  readonly decMinDeg: string;
  readonly decMaxDeg: string;
  readonly poleRaDeg: string;
  readonly poleDecDeg: string;
  readonly thicknessDeg: string;
  /** Where the picture ends; empty shows everything. */
  readonly depthRedshift: string;
  /** Null takes the study's name, or the caption that is offered. */
  readonly title: string | null;
  readonly caption: string | null;
  readonly credit: string;
  readonly labels: readonly LabelDraft[];
  readonly rulers: boolean;
  readonly shells: boolean;
  readonly transparent: boolean;
}

export const FIRST_CHOICES: PictureChoices = {
  what: 'picture',
  filmKind: 'turntable',
  filmSize: '1920x1080',
  seconds: '12',
  framesPerSecond: '30',
  field: 1,
  view: 'cone',
  size: '4k',
  upright: false,
  ownWidthPx: '3000',
  ownHeightPx: '2000',
  dpi: '300',
  style: 'dark',
  colourBy: null,
  colourMap: null,
  light: {},
  slab: 'offered',
  decMinDeg: '',
  decMaxDeg: '',
  poleRaDeg: '',
  poleDecDeg: '',
  thicknessDeg: '4',
  depthRedshift: '',
  title: null,
  caption: null,
  credit: '',
  labels: [],
  rulers: true,
  shells: true,
  transparent: false,
};

export const VIEW_CHOICES: readonly { readonly value: PictureView; readonly label: string }[] = [
  { value: 'cone', label: 'Cone, side-on' },
  { value: 'perspective', label: 'Cone in perspective' },
  { value: 'wedge', label: 'Wedge, laid flat' },
  { value: 'sky', label: 'Shells on the sky' },
  { value: 'light-cone', label: 'Light-cone diagram' },
];

export const SIZE_CHOICES = [
  { value: 'screen', label: 'This window' },
  { value: '4k', label: '4K, 3840 × 2160' },
  { value: '8k', label: '8K, 7680 × 4320' },
  { value: 'square', label: 'Square, 4096 × 4096' },
  { value: 'portrait', label: 'Portrait, 2160 × 3840' },
  { value: 'a4', label: 'A4 at 300 dpi' },
  { value: 'a3', label: 'A3 at 300 dpi' },
  { value: 'a2', label: 'A2 at 300 dpi' },
  { value: 'a1', label: 'A1 at 300 dpi' },
  { value: 'a0', label: 'A0 at 300 dpi' },
  { value: 'own', label: 'Own size' },
] as const;

export const FILM_KIND_CHOICES: readonly { readonly value: FilmKind; readonly label: string }[] = [
  { value: 'turntable', label: 'Turntable' },
  { value: 'fly-along', label: 'Fly-along' },
  { value: 'shell-by-shell', label: 'Shell by shell' },
];

export const FILM_SIZE_CHOICES = [
  { value: '1280x720', label: '1280 × 720' },
  { value: '1920x1080', label: '1920 × 1080' },
  { value: '4k', label: '4K, 3840 × 2160' },
  { value: '1080x1080', label: 'Square, 1080 × 1080' },
  { value: '1080x1920', label: 'Portrait, 1080 × 1920' },
  { value: 'own', label: 'Own size' },
] as const;

export const isSheet = (size: string): boolean => /^a[0-4]$/.test(size);
