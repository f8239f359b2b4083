import { createContext, type ReactNode, useCallback, useContext, useEffect, useState } from "react";
import { Button } from "./Button";
import { Icon } from "./Icon";

export interface FlashMessage {
  /** Told apart by this: the same message twice is two messages. */
  id: string;
  tone?: "done" | "failed";
  text: string;
  /** Takes back what the message tells; offered for `forMs`. */
  undo?: { act: () => void; forMs: number };
}

interface ToastActions {
  show: (message: FlashMessage) => void;
}

const STAYS_MS = 8_000;
const ToastContext = createContext<ToastActions>({ show: () => undefined });

/** `show({ id, text })` puts a message into the page's message region. */
export function useToast(): ToastActions {
  return useContext(ToastContext);
}

/** The message region: messages kept across a redirect (drawn by the server) and those of the page. */
export function ToastProvider({ flash, children }: { flash: FlashMessage | null; children: ReactNode }) {
  const [shown, setShown] = useState<FlashMessage[]>(flash ? [flash] : []);
  const show = useCallback((message: FlashMessage) => {
    setShown((before) => [...before.filter((other) => other.id !== message.id), message]);
  }, []);
  const drop = useCallback((id: string) => setShown((before) => before.filter((one) => one.id !== id)), []);
  useEffect(() => {
    if (flash) show(flash);
  }, [flash, show]);
  return (
    <ToastContext.Provider value={{ show }}>
      {children}
      <div className="toasts no-print" role="status" aria-live="polite">
        {shown.map((message) => (
          <Toast key={message.id} message={message} onClose={drop} />
        ))}
      </div>
    </ToastContext.Provider>
  );
}

function Toast({ message, onClose }: { message: FlashMessage; onClose: (id: string) => void }) {
  const failed = message.tone === "failed";
  useEffect(() => {
    // What failed stays until it is closed.
    if (failed) return;
    const timer = setTimeout(() => onClose(message.id), message.undo?.forMs ?? STAYS_MS);
    return () => clearTimeout(timer);
  }, [failed, message.id, message.undo, onClose]);
  return (
    <div className={`toast ${failed ? "tone-alarm" : "tone-moss"}`}>
      <Icon name={failed ? "warning" : "check"} />
      <p>{message.text}</p>
      {message.undo && (
        <Button
          type="button"
          variant="quiet"
          size="small"
          onClick={() => {
            message.undo?.act();
            onClose(message.id);
          }}
        >
          Undo
        </Button>
      )}
      <Button type="button" variant="quiet" size="small" onClick={() => onClose(message.id)}>
        Close
      </Button>
    </div>
  );
}
