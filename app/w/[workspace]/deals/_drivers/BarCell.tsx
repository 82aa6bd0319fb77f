import { Figure } from "@/app/_ui/Figure";
import styles from "./drivers.module.css";

/** An amount with a bar of its size behind it; gains are hatched, so that the sign needs no colour. */
export function BarCell({
  value,
  most,
  otherwise,
}: {
  value: number | null;
  most: number;
  otherwise?: string;
}) {
  const share = value === null || most === 0 ? 0 : (100 * Math.abs(value)) / most;
  return (
    <span className={styles.cell}>
      <span
        aria-hidden
        className={value !== null && value > 0 ? styles.gain : styles.loss}
        style={{ width: `${share}%` }}
      />
      <span className={styles.value}>
        <Figure value={value} unit="money" {...(otherwise ? { otherwise } : {})} />
      </span>
    </span>
  );
}
