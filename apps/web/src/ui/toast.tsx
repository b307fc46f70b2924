import { Toast as Primitive } from 'radix-ui';
import { createContext, type ReactNode, use, useCallback, useMemo, useState } from 'react';
import { CloseButton } from './close-button.tsx';

interface ToastMessage {
  id: number;
  text: ReactNode;
}
const Toasts = createContext<(text: ReactNode) => void>(() => {});

/** Says what happened elsewhere: another person’s edit, a delivery that failed. Never what was just clicked. */
export function useToast(): (text: ReactNode) => void {
  return use(Toasts);
}

export function ToastProvider({ children }: { children: ReactNode }) {
  const [messages, setMessages] = useState<readonly ToastMessage[]>([]);
  const show = useCallback(
    (text: ReactNode) => setMessages((list) => [...list.slice(-2), { id: (list.at(-1)?.id ?? 0) + 1, text }]),
    [],
  );
  const drop = (id: number) => setMessages((list) => list.filter((message) => message.id !== id));
  const value = useMemo(() => show, [show]);
  return (
    <Toasts value={value}>
      <Primitive.Provider duration={8000} label="Happened elsewhere">
        {children}
        {messages.map((message) => (
          <Primitive.Root
            key={message.id}
            onOpenChange={(open) => !open && drop(message.id)}
            className="flex items-center gap-3 border border-ink bg-sheet px-4 py-2 text-grid"
          >
            <Primitive.Description>{message.text}</Primitive.Description>
            <Primitive.Close asChild>
              <CloseButton />
            </Primitive.Close>
          </Primitive.Root>
        ))}
        <Primitive.Viewport className="fixed right-4 bottom-16 z-60 flex w-[min(24rem,calc(100vw-2rem))] flex-col gap-2 outline-none desk:bottom-4" />
      </Primitive.Provider>
    </Toasts>
  );
}
