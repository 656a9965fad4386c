import { Menu, Portal } from '@chakra-ui/react';
import type { ReactElement } from 'react';

export interface ActionItem {
  readonly id: string;
  readonly label: string;
  readonly onSelect: () => void;
  readonly disabled?: boolean;
}

interface ActionMenuProps {
  /** The button that opens it; it must have words or an aria-label of its own. */
  readonly trigger: ReactElement;
  /** Groups are parted by a line. */
  readonly groups: readonly (readonly ActionItem[])[];
  /** Said above the first item: whose menu this is. */
  readonly title?: string;
}

/** Everything that can be done with one thing, by finger, mouse and arrow keys. */
export function ActionMenu({ trigger, groups, title }: ActionMenuProps) {
  const shown = groups.filter((items) => items.length > 0);
  return (
    <Menu.Root
      lazyMount
      unmountOnExit
      onSelect={({ value }) =>
        shown
          .flat()
          .find((item) => item.id === value)
          ?.onSelect()
      }
    >
      <Menu.Trigger asChild>{trigger}</Menu.Trigger>
      <Portal>
        <Menu.Positioner>
          <Menu.Content>
            {title ? (
              <Menu.ItemGroup>
                <Menu.ItemGroupLabel>{title}</Menu.ItemGroupLabel>
              </Menu.ItemGroup>
            ) : null}
            {shown.map((items, group) => (
              <Menu.ItemGroup key={items.map((item) => item.id).join()}>
                {group > 0 ? <Menu.Separator /> : null}
                {items.map((item) => (
                  <Menu.Item key={item.id} value={item.id} {...(item.disabled ? { disabled: true } : {})}>
                    {item.label}
                  </Menu.Item>
                ))}
              </Menu.ItemGroup>
            ))}
          </Menu.Content>
        </Menu.Positioner>
      </Portal>
    </Menu.Root>
  );
}
