"use client";

import { generateReactHelpers } from "@uploadthing/react";
import { useRouter } from "next/navigation";
import { useId, useState } from "react";
import type { Uploads } from "@/lib/storage/uploads";

const { useUploadThing } = generateReactHelpers<Uploads>();
const MOST_BYTES = 25 * 1024 * 1024;

/** Takes photos from the camera or the disk, with progress; what is refused says why and the rest goes on. */
export function PhotoUpload({
  caseId,
  workJobId,
  label = "Add photos",
}: {
  caseId: string;
  workJobId?: string;
  label?: string;
}) {
  const router = useRouter();
  const id = useId();
  const [progress, setProgress] = useState<number | null>(null);
  const [message, setMessage] = useState("");
  const { startUpload, isUploading } = useUploadThing("photo", {
    onUploadProgress: setProgress,
    onClientUploadComplete: () => {
      setProgress(null);
      setMessage("Stored. They show once they have been looked at.");
      router.refresh();
    },
    onUploadError: (error) => {
      setProgress(null);
      setMessage(`Not stored: ${error.message}`);
    },
  });

  async function take(list: FileList | null) {
    const files = [...(list ?? [])];
    if (files.length === 0) return;
    const tooLarge = files.filter((file) => file.size > MOST_BYTES);
    const rest = files.filter((file) => file.size <= MOST_BYTES);
    setMessage(tooLarge.length > 0 ? `Larger than 25 MB: ${tooLarge.map((file) => file.name).join(", ")}` : "");
    if (rest.length > 0) await startUpload(rest, { caseId, workJobId });
  }

  return (
    <div className="field">
      <label className="btn quiet" htmlFor={id}>
        {isUploading ? `Storing ${progress ?? 0} %` : label}
      </label>
      <input
        id={id}
        className="vh"
        type="file"
        accept="image/*"
        capture="environment"
        multiple
        disabled={isUploading}
        onChange={(event) => {
          void take(event.target.files);
          event.target.value = "";
        }}
      />
      {message && (
        <p className="note" role="status">
          {message}
        </p>
      )}
    </div>
  );
}
