import { Tabs as RadixTabs } from 'radix-ui';
import type { ReactNode } from 'react';

interface TabsProps<Value extends string> {
  label: string;
  value: Value;
  onValueChange: (value: Value) => void;
  tabs: readonly { value: Value; label: ReactNode }[];
  children: ReactNode;
  className?: string;
}

/** Parts of one thing, one shown at a time; arrows move between them. Contents are `TabPanel`s. */
export function Tabs<Value extends string>({
  label,
  value,
  onValueChange,
  tabs,
  children,
  className,
}: TabsProps<Value>) {
  const choose = (chosen: string) => {
    const tab = tabs.find((one) => one.value === chosen);
    if (tab) onValueChange(tab.value);
  };
  return (
    <RadixTabs.Root value={value} onValueChange={choose} {...(className ? { className } : {})}>
      <RadixTabs.List
        aria-label={label}
        className="flex gap-1 overflow-x-auto border-b border-rule"
      >
        {tabs.map((tab) => (
          <RadixTabs.Trigger
            key={tab.value}
            value={tab.value}
            className="min-h-8 cursor-pointer border-b-2 border-transparent px-3 whitespace-nowrap text-ink-soft hover:text-ink data-[state=active]:border-ink data-[state=active]:font-medium data-[state=active]:text-ink"
          >
            {tab.label}
          </RadixTabs.Trigger>
        ))}
      </RadixTabs.List>
      {children}
    </RadixTabs.Root>
  );
}

export const TabPanel = RadixTabs.Content;
