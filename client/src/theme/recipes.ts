import { defineRecipe, defineSlotRecipe } from '@chakra-ui/react';

// Edges that mark where one can type or press are ink-2 (3:1 or better), rules are line.
const edge = { borderWidth: '1.5px', borderStyle: 'solid', borderColor: 'ink2', borderRadius: 'm' };

const control = {
  ...edge,
  width: '100%',
  minHeight: 'touch',
  paddingInline: '3',
  background: 'raised',
  color: 'ink',
  fontSize: '16px', // smaller makes phones zoom into the field
  '&::placeholder': { color: 'ink2', opacity: 1 },
  '&[aria-invalid=true]': { borderColor: 'break' },
  '&:disabled': { opacity: 0.6 },
};

const field = defineSlotRecipe({
  className: 'pw-field',
  slots: ['root', 'errorText', 'helperText', 'label', 'requiredIndicator'],
  base: {
    root: { display: 'flex', flexDirection: 'column', gap: '1', width: '100%', minWidth: 0 },
    label: { fontWeight: 'semibold', fontSize: 'sm' },
    helperText: { color: 'ink2', fontSize: 'sm' },
    errorText: { color: 'fg.error', fontSize: 'sm', fontWeight: 'semibold' },
  },
});

const nativeSelect = defineSlotRecipe({
  className: 'pw-select',
  slots: ['root', 'field', 'indicator'],
  base: {
    root: { position: 'relative', width: '100%' },
    field: { ...control, paddingInlineEnd: '9', appearance: 'none', '& > option': { background: 'raised' } },
    indicator: {
      position: 'absolute',
      insetInlineEnd: '2.5',
      top: '50%',
      transform: 'translateY(-50%)',
      pointerEvents: 'none',
      color: 'ink2',
      fontSize: '18px',
      '& svg': { width: '1em', height: '1em' },
    },
  },
});

const dialog = defineSlotRecipe({
  className: 'pw-dialog',
  slots: [
    'trigger',
    'backdrop',
    'positioner',
    'content',
    'title',
    'description',
    'closeTrigger',
    'header',
    'body',
    'footer',
  ],
  base: {
    backdrop: { position: 'fixed', inset: 0, background: 'var(--veil)', zIndex: 'dialog' },
    positioner: {
      position: 'fixed',
      inset: 0,
      display: 'flex',
      justifyContent: 'center',
      alignItems: { base: 'flex-end', sm: 'flex-start' },
      paddingTop: { base: '6', sm: '16' },
      zIndex: 'dialog',
      overflow: 'auto',
    },
    content: {
      width: '100%',
      maxWidth: { base: '100%', sm: '30rem' },
      maxHeight: { base: '90dvh', sm: 'none' },
      overflow: { base: 'auto', sm: 'visible' },
      background: 'ground',
      color: 'ink',
      border: '1px solid var(--line)',
      borderRadius: 'l',
      padding: { base: '5', sm: '6' },
      outline: 0,
    },
    title: { fontSize: 'xl', fontWeight: 'black', letterSpacing: '-.015em', lineHeight: 1.15 },
    description: { color: 'ink2', marginTop: '1' },
    body: { marginTop: '3' },
    footer: { display: 'flex', flexWrap: 'wrap', gap: '3', marginTop: '5' },
  },
  variants: {
    size: { md: {}, lg: { content: { maxWidth: { base: '100%', sm: '44rem' } } } },
  },
  defaultVariants: { size: 'md' },
});

const menu = defineSlotRecipe({
  className: 'pw-menu',
  slots: [
    'arrow',
    'arrowTip',
    'content',
    'contextTrigger',
    'indicator',
    'item',
    'itemGroup',
    'itemGroupLabel',
    'itemIndicator',
    'itemText',
    'positioner',
    'separator',
    'trigger',
    'triggerItem',
    'itemCommand',
  ],
  base: {
    content: {
      minWidth: '12rem',
      maxHeight: 'var(--available-height)',
      overflowY: 'auto',
      background: 'raised',
      color: 'ink',
      ...edge,
      zIndex: 'popover',
      paddingBlock: '1',
      outline: 0,
    },
    item: {
      display: 'flex',
      alignItems: 'center',
      gap: '2',
      minHeight: 'touch',
      paddingInline: '3.5',
      cursor: 'pointer',
      fontWeight: 'semibold',
      outline: 0,
      textDecoration: 'none',
      color: 'ink',
      '&[data-highlighted]': { background: 'varnish', color: 'varnishInk' },
      '&[data-disabled]': { color: 'ink2', cursor: 'default', fontWeight: 'normal' },
    },
    itemGroupLabel: { paddingInline: '3.5', paddingTop: '2', color: 'ink2', fontSize: 'sm' },
    separator: { height: '1px', border: 0, background: 'line', marginBlock: '1' },
  },
});

/** Only what the application uses; a component without its recipe here has no look of its own. */
export const slotRecipes = { field, nativeSelect, dialog, menu };

export const recipes = {
  input: defineRecipe({ className: 'pw-input', base: control }),
  textarea: defineRecipe({
    className: 'pw-textarea',
    base: { ...control, paddingBlock: '2.5', lineHeight: 1.4, resize: 'vertical' },
  }),
};
