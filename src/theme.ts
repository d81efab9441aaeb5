import { definePreset } from '@primeuix/themes'
import base from '@primeuix/themes/aura/base'
import datatable from '@primeuix/themes/aura/datatable'
import paginator from '@primeuix/themes/aura/paginator'

/** Shades between the page and the ink; they follow `data-theme` because the custom properties do. */
function shades(of: string) {
  const mix = (percent: number) => `color-mix(in srgb, ${of} ${percent}%, var(--card))`
  return {
    0: 'var(--card)',
    50: mix(4),
    100: mix(8),
    200: mix(16),
    300: mix(30),
    400: mix(50),
    500: of,
    600: of,
    700: of,
    800: of,
    900: of,
    950: of,
  }
}

/** One mapping for both themes: `tokens.css` holds the colours, and changes them by `data-theme`. */
const scheme = {
  surface: shades('var(--ink)'),
  primary: {
    color: 'var(--solid)',
    contrastColor: 'var(--on-solid)',
    hoverColor: 'color-mix(in srgb, var(--solid) 88%, var(--needle))',
    activeColor: 'var(--solid)',
  },
  highlight: {
    background: 'var(--sunk)',
    focusBackground: 'var(--sunk)',
    color: 'var(--ink)',
    focusColor: 'var(--ink)',
  },
  mask: { background: 'var(--shade)', color: 'var(--ink)' },
  formField: {
    background: 'var(--card)',
    disabledBackground: 'var(--sunk)',
    filledBackground: 'var(--card)',
    filledHoverBackground: 'var(--card)',
    filledFocusBackground: 'var(--card)',
    borderColor: 'var(--edge)',
    hoverBorderColor: 'var(--ink)',
    focusBorderColor: 'var(--ink)',
    invalidBorderColor: 'var(--unfit)',
    color: 'var(--ink)',
    disabledColor: 'var(--soft)',
    placeholderColor: 'var(--soft)',
    invalidPlaceholderColor: 'var(--unfit)',
    iconColor: 'var(--soft)',
    shadow: 'none',
  },
  text: {
    color: 'var(--ink)',
    hoverColor: 'var(--ink)',
    mutedColor: 'var(--soft)',
    hoverMutedColor: 'var(--ink)',
  },
  content: {
    background: 'var(--card)',
    hoverBackground: 'var(--sunk)',
    borderColor: 'var(--line)',
    color: 'var(--ink)',
    hoverColor: 'var(--ink)',
  },
  overlay: {
    select: { background: 'var(--card)', borderColor: 'var(--edge)', color: 'var(--ink)' },
    popover: { background: 'var(--card)', borderColor: 'var(--edge)', color: 'var(--ink)' },
    modal: { background: 'var(--card)', borderColor: 'var(--edge)', color: 'var(--ink)' },
  },
  list: {
    option: {
      focusBackground: 'var(--sunk)',
      selectedBackground: 'var(--sunk)',
      selectedFocusBackground: 'var(--line)',
      color: 'var(--ink)',
      focusColor: 'var(--ink)',
      selectedColor: 'var(--ink)',
      selectedFocusColor: 'var(--ink)',
      icon: { color: 'var(--soft)', focusColor: 'var(--ink)' },
    },
    optionGroup: { background: 'transparent', color: 'var(--soft)' },
  },
  navigation: {
    item: {
      focusBackground: 'var(--sunk)',
      activeBackground: 'var(--sunk)',
      color: 'var(--ink)',
      focusColor: 'var(--ink)',
      activeColor: 'var(--ink)',
      icon: { color: 'var(--soft)', focusColor: 'var(--ink)', activeColor: 'var(--ink)' },
    },
  },
}

/**
 * The preset of the component library: the base and the tokens of the components that some screen uses, not the whole
 * set. A screen that needs another component adds its tokens here.
 */
export const preset = definePreset(
  {
    ...base,
    components: { datatable, paginator },
  },
  {
    primitive: {
      borderRadius: { none: '0', xs: '2px', sm: '3px', md: '3px', lg: '4px', xl: '6px' },
    },
    components: {
      // Rows for a desk: 25 of them in one screen and a half.
      datatable: {
        headerCell: { padding: '0.5rem 0.9rem', focusRing: { offset: '-3px' } },
        bodyCell: { padding: '0.3rem 0.9rem' },
        paginatorBottom: { borderWidth: '0' },
        colorScheme: { dark: { root: { borderColor: '{content.border.color}' } } },
      },
      paginator: { root: { padding: '0.5rem 0' }, navButton: { borderRadius: '3px' } },
    },
    semantic: {
      primary: shades('var(--solid)'),
      focusRing: { width: '3px', style: 'solid', color: 'var(--needle)', offset: '2px', shadow: 'none' },
      formField: {
        paddingX: '0.7rem',
        paddingY: '0.55rem',
        borderRadius: '3px',
        focusRing: { width: '3px', style: 'solid', color: 'var(--needle)', offset: '1px', shadow: 'none' },
      },
      colorScheme: { light: scheme, dark: scheme },
    },
  },
)
