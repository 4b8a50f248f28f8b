import { buttonStyle } from "@/components/ui/button-style";
import { Icon } from "@/components/ui/icon";

type Props = {
  onFiles: (files: File[]) => void;
  /** "Take photo" */
  take: string;
  /** What they add to; read aloud after "Choose", which says little by itself. */
  of: string;
  several?: boolean;
  disabled?: boolean;
};

/**
 * Two ways to a picture: the camera itself, and what is on this device. They are native file fields, because
 * only those open the phone's own camera.
 */
export function PhotoButtons({ onFiles, take, of, several = true, disabled }: Props) {
  return (
    <div className="flex gap-2.5">
      {[true, false].map((camera) => (
        <label
          key={String(camera)}
          className={buttonStyle("quiet", "small", `file-button ${camera ? "grow" : ""}`)}
        >
          {camera ? <Icon name="camera" /> : null}
          {camera ? take : "Choose"}
          <input
            type="file"
            accept="image/*"
            capture={camera ? "environment" : undefined}
            multiple={several && !camera}
            disabled={disabled}
            aria-label={camera ? take : `Choose: ${of}`}
            onChange={({ target }) => {
              const files = [...(target.files ?? [])];
              // Emptied, so that the same picture can be chosen again.
              target.value = "";
              if (files.length > 0) onFiles(files);
            }}
          />
        </label>
      ))}
    </div>
  );
}
