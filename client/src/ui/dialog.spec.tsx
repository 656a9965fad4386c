import { ChakraProvider } from '@chakra-ui/react';
import { render, screen } from '@testing-library/react';
import type { ReactNode, SyntheticEvent } from 'react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { system } from '../theme/system';
import { ActionMenu } from './action-menu';
import { Button } from './button';
import { Dialog } from './dialog';
import { StatusProvider, useSay } from './status';

const desk = (children: ReactNode) => render(<ChakraProvider value={system}>{children}</ChakraProvider>);

describe('Dialog', () => {
  it('is named by its title, described by its sentence, and closed with Escape', async () => {
    const onClose = vi.fn();
    desk(<Dialog open onClose={onClose} title="Take out Stone Weir?" about="It stays in the library." />);
    const dialog = await screen.findByRole('dialog', { name: 'Take out Stone Weir?' });
    const described = document.getElementById(dialog.getAttribute('aria-describedby') ?? '');
    expect(described?.textContent).toBe('It stays in the library.');
    await userEvent.keyboard('{Escape}');
    expect(onClose).toHaveBeenCalledOnce();
  });

  it('is not there while closed', () => {
    desk(<Dialog open={false} onClose={() => undefined} title="Take out Stone Weir?" />);
    expect(screen.queryByRole('dialog')).toBeNull();
  });
});

describe('ActionMenu', () => {
  it('opens and chooses by keyboard alone, passing over what cannot be done', async () => {
    const [pin, later] = [vi.fn(), vi.fn()];
    desk(
      <ActionMenu
        trigger={<Button aria-label="What to do with Stone Weir">…</Button>}
        groups={[
          [
            { id: 'earlier', label: 'Earlier', onSelect: () => undefined, disabled: true },
            { id: 'later', label: 'Later', onSelect: later },
          ],
          [{ id: 'pin', label: 'Pin here', onSelect: pin }],
        ]}
      />,
    );
    await userEvent.tab();
    await userEvent.keyboard('{Enter}');
    await screen.findByRole('menuitem', { name: 'Pin here' });
    expect(screen.getByRole('menuitem', { name: 'Earlier' }).getAttribute('aria-disabled')).toBe('true');
    await userEvent.keyboard('{End}{Enter}');
    expect(pin).toHaveBeenCalledOnce();
    expect(later).not.toHaveBeenCalled();
  });
});

describe('the status line', () => {
  function Take({ undo }: { readonly undo: () => void }) {
    const say = useSay();
    return (
      <Button onClick={() => say('Stone Weir is out.', { label: 'Undo', onPress: undo })}>Take out</Button>
    );
  }

  it('says what happened in a live region and offers the way back', async () => {
    const undo = vi.fn();
    render(
      <StatusProvider>
        <Take undo={undo} />
      </StatusProvider>,
    );
    expect(screen.getByRole('status').textContent).toBe('');
    await userEvent.click(screen.getByRole('button', { name: 'Take out' }));
    expect(screen.getByRole('status').textContent).toContain('Stone Weir is out.');
    await userEvent.click(screen.getByRole('button', { name: 'Undo' }));
    expect(undo).toHaveBeenCalledOnce();
    expect(screen.getByRole('status').textContent).toBe('');
  });
});

describe('Button', () => {
  it('keeps its place in the tab order while it cannot be pressed', async () => {
    const onClick = vi.fn();
    render(
      <Button disabled onClick={onClick}>
        Save
      </Button>,
    );
    await userEvent.tab();
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Save' }));
    await userEvent.keyboard('{Enter}');
    expect(onClick).not.toHaveBeenCalled();
  });

  it('says what runs, and sends a form only once', async () => {
    const onSubmit = vi.fn((event: SyntheticEvent) => event.preventDefault());
    render(
      <form onSubmit={onSubmit}>
        <Button type="submit" busy="Saving">
          Save
        </Button>
      </form>,
    );
    await userEvent.click(screen.getByRole('button', { name: 'Saving …' }));
    expect(onSubmit).not.toHaveBeenCalled();
  });
});
