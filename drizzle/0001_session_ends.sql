DROP INDEX `session_upload`;--> statement-breakpoint
ALTER TABLE `session` ADD `start_lat_deg` real;--> statement-breakpoint
ALTER TABLE `session` ADD `start_lon_deg` real;--> statement-breakpoint
ALTER TABLE `session` ADD `end_lat_deg` real;--> statement-breakpoint
ALTER TABLE `session` ADD `end_lon_deg` real;--> statement-breakpoint
CREATE UNIQUE INDEX `session_upload_entry` ON `session` (`upload_id`,`entry_name`);