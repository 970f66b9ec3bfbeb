CREATE TABLE `audit_events` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16),
	`production_id` binary(16),
	`user_id` binary(16),
	`actor_name` varchar(160) NOT NULL,
	`action` varchar(60) NOT NULL,
	`subject_kind` varchar(40) NOT NULL,
	`subject_id` binary(16),
	`summary` varchar(300) NOT NULL,
	`detail` json,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `audit_events_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `files` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16) NOT NULL,
	`production_id` binary(16),
	`sha256` varchar(64) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`bytes` bigint NOT NULL,
	`media_type` varchar(100) NOT NULL,
	`storage_key` varchar(120) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`name` varchar(200) NOT NULL,
	`kind` varchar(30) NOT NULL,
	`uploaded_by` binary(16),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `files_id` PRIMARY KEY(`id`),
	CONSTRAINT `files_storage_key_unique` UNIQUE(`storage_key`)
);
--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16),
	`to_email` varchar(254) NOT NULL,
	`template` varchar(60) NOT NULL,
	`data` json NOT NULL,
	`dedupe_key` varchar(190) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`tries` int NOT NULL DEFAULT 0,
	`next_try_at` datetime(3) NOT NULL,
	`sent_at` datetime(3),
	`gave_up_at` datetime(3),
	`last_error` text,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `outbox_id` PRIMARY KEY(`id`),
	CONSTRAINT `outbox_dedupe_key_unique` UNIQUE(`dedupe_key`)
);
--> statement-breakpoint
CREATE TABLE `attendances` (
	`day_id` binary(16) NOT NULL,
	`sign_up_id` binary(16) NOT NULL,
	`here_at` datetime(3),
	`in_at` datetime(3),
	`out_at` datetime(3),
	CONSTRAINT `attendances_day_id_sign_up_id_pk` PRIMARY KEY(`day_id`,`sign_up_id`)
);
--> statement-breakpoint
CREATE TABLE `audition_days` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`local_date` date NOT NULL,
	`zone` varchar(64) NOT NULL,
	`slot_minutes` smallint NOT NULL,
	`rest_after_minutes` smallint NOT NULL DEFAULT 80,
	`rest_minutes` smallint NOT NULL DEFAULT 10,
	`lunch_minutes` smallint NOT NULL DEFAULT 0,
	`lunch_from` varchar(5),
	`lunch_to` varchar(5),
	`version` int NOT NULL DEFAULT 1,
	`removed_at` datetime(3),
	CONSTRAINT `audition_days_id` PRIMARY KEY(`id`),
	CONSTRAINT `audition_days_slot` CHECK(`audition_days`.`slot_minutes` between 1 and 120)
);
--> statement-breakpoint
CREATE TABLE `audition_rooms` (
	`id` binary(16) NOT NULL,
	`day_id` binary(16) NOT NULL,
	`room_id` binary(16) NOT NULL,
	`opens_at` datetime(3) NOT NULL,
	`closes_at` datetime(3) NOT NULL,
	CONSTRAINT `audition_rooms_id` PRIMARY KEY(`id`),
	CONSTRAINT `audition_rooms_once` UNIQUE(`day_id`,`room_id`),
	CONSTRAINT `audition_rooms_order` CHECK(`audition_rooms`.`opens_at` < `audition_rooms`.`closes_at`)
);
--> statement-breakpoint
CREATE TABLE `day_links` (
	`id` binary(16) NOT NULL,
	`day_id` binary(16) NOT NULL,
	`token_hash` varchar(64) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`revoked_at` datetime(3),
	CONSTRAINT `day_links_id` PRIMARY KEY(`id`),
	CONSTRAINT `day_links_token_hash_unique` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `sign_ups` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`state` enum('listed','invited','confirmed','declined','withdrawn') NOT NULL DEFAULT 'listed',
	`place` int NOT NULL,
	`song` varchar(200),
	`bars` smallint,
	`asks_for` varchar(200),
	`not_before` varchar(5),
	`not_after` varchar(5),
	`invited_at` datetime(3),
	`answered_at` datetime(3),
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `sign_ups_id` PRIMARY KEY(`id`),
	CONSTRAINT `sign_ups_once` UNIQUE(`production_id`,`person_id`)
);
--> statement-breakpoint
CREATE TABLE `slot_assignments` (
	`slot_id` binary(16) NOT NULL,
	`sign_up_id` binary(16) NOT NULL,
	`day_id` binary(16) NOT NULL,
	CONSTRAINT `slot_assignments_slot_id` PRIMARY KEY(`slot_id`),
	CONSTRAINT `slot_assignments_day` UNIQUE(`sign_up_id`,`day_id`)
);
--> statement-breakpoint
CREATE TABLE `slots` (
	`id` binary(16) NOT NULL,
	`audition_room_id` binary(16) NOT NULL,
	`kind` enum('slot','rest','lunch','hold') NOT NULL,
	`starts_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	CONSTRAINT `slots_id` PRIMARY KEY(`id`),
	CONSTRAINT `slots_room_start` UNIQUE(`audition_room_id`,`starts_at`)
);
--> statement-breakpoint
CREATE TABLE `callback_invitations` (
	`id` binary(16) NOT NULL,
	`round_id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`issue` int NOT NULL,
	`snapshot` json NOT NULL,
	`published_at` datetime(3) NOT NULL,
	`superseded_at` datetime(3),
	`answer` enum('yes','no'),
	`answered_at` datetime(3),
	CONSTRAINT `callback_invitations_id` PRIMARY KEY(`id`),
	CONSTRAINT `callback_invitations_once` UNIQUE(`round_id`,`person_id`,`issue`)
);
--> statement-breakpoint
CREATE TABLE `callback_marks` (
	`round_id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`role_id` binary(16) NOT NULL,
	`marked_at` datetime(3) NOT NULL,
	CONSTRAINT `callback_marks_round_id_person_id_role_id_pk` PRIMARY KEY(`round_id`,`person_id`,`role_id`)
);
--> statement-breakpoint
CREATE TABLE `callback_rounds` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`title` varchar(120) NOT NULL,
	`starts_at` datetime(3),
	`ends_at` datetime(3),
	`zone` varchar(64) NOT NULL,
	`room_id` binary(16),
	`material` text,
	`issue` int NOT NULL DEFAULT 0,
	`published_at` datetime(3),
	`version` int NOT NULL DEFAULT 1,
	CONSTRAINT `callback_rounds_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `blocks` (
	`id` binary(16) NOT NULL,
	`call_id` binary(16) NOT NULL,
	`place` int NOT NULL,
	`kind` enum('number','scene','warm_up','break') NOT NULL,
	`minutes` smallint NOT NULL,
	`number_id` binary(16),
	`title` varchar(160),
	`bars` varchar(40),
	`detail` varchar(200),
	CONSTRAINT `blocks_id` PRIMARY KEY(`id`),
	CONSTRAINT `blocks_place` UNIQUE(`call_id`,`place`),
	CONSTRAINT `blocks_minutes` CHECK(`blocks`.`minutes` between 1 and 720),
	CONSTRAINT `blocks_number` CHECK(`blocks`.`kind` <> 'number' or `blocks`.`number_id` is not null)
);
--> statement-breakpoint
CREATE TABLE `called` (
	`block_id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`source` enum('score','hand') NOT NULL,
	`reason` varchar(200),
	`excused` boolean NOT NULL DEFAULT false,
	CONSTRAINT `called_block_id_person_id_pk` PRIMARY KEY(`block_id`,`person_id`)
);
--> statement-breakpoint
CREATE TABLE `calls` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`kind` enum('music','staging','choreography','orchestra','sitzprobe','wandelprobe','tech','dress','put_in','brush_up','performance') NOT NULL,
	`title` varchar(160),
	`starts_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	`local_date` date NOT NULL,
	`local_time` varchar(5) NOT NULL,
	`zone` varchar(64) NOT NULL,
	`room_id` binary(16),
	`leader_id` binary(16),
	`pianist_id` binary(16),
	`state` enum('draft','published','cancelled') NOT NULL DEFAULT 'draft',
	`version` int NOT NULL DEFAULT 1,
	CONSTRAINT `calls_id` PRIMARY KEY(`id`),
	CONSTRAINT `calls_order` CHECK(`calls`.`starts_at` < `calls`.`ends_at`)
);
--> statement-breakpoint
CREATE TABLE `conflicts` (
	`id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`starts_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	`local_from` date NOT NULL,
	`local_to` date NOT NULL,
	`time_from` varchar(5),
	`time_to` varchar(5),
	`zone` varchar(64) NOT NULL,
	`reason` varchar(160),
	`state` enum('asked','agreed','declined') NOT NULL DEFAULT 'asked',
	`decided_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`removed_at` datetime(3),
	CONSTRAINT `conflicts_id` PRIMARY KEY(`id`),
	CONSTRAINT `conflicts_order` CHECK(`conflicts`.`starts_at` < `conflicts`.`ends_at`)
);
--> statement-breakpoint
CREATE TABLE `choices` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`role_id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`kind` enum('principal','alternate','cover','swing') NOT NULL DEFAULT 'principal',
	`state` enum('considered','cast') NOT NULL,
	`note` varchar(400),
	`chosen_by` binary(16),
	`chosen_at` datetime(3) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	CONSTRAINT `choices_id` PRIMARY KEY(`id`),
	CONSTRAINT `choices_once` UNIQUE(`role_id`,`person_id`)
);
--> statement-breakpoint
CREATE TABLE `companies` (
	`id` binary(16) NOT NULL,
	`name` varchar(160) NOT NULL,
	`zone` varchar(64) NOT NULL,
	`locale` varchar(20) NOT NULL DEFAULT 'en-GB',
	`paper` enum('A4','Letter') NOT NULL DEFAULT 'A4',
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `companies_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` binary(16) NOT NULL,
	`position_id` binary(16) NOT NULL,
	`email` varchar(254) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`token_hash` varchar(64) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`invited_by` binary(16),
	`expires_at` datetime(3) NOT NULL,
	`accepted_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `invitations_id` PRIMARY KEY(`id`),
	CONSTRAINT `invitations_token_hash_unique` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `people` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16) NOT NULL,
	`user_id` binary(16),
	`name` varchar(160) NOT NULL,
	`email` varchar(254) character set utf8mb4 collate utf8mb4_bin,
	`phone` varchar(40),
	`pronouns` varchar(40),
	`minor` boolean NOT NULL DEFAULT false,
	`guardian_name` varchar(160),
	`guardian_email` varchar(254),
	`created_at` datetime(3) NOT NULL,
	`removed_at` datetime(3),
	CONSTRAINT `people_id` PRIMARY KEY(`id`),
	CONSTRAINT `people_company_email` UNIQUE(`company_id`,`email`),
	CONSTRAINT `people_company_user` UNIQUE(`company_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `positions` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`production_id` binary(16),
	`kind` enum('music_director','assistant_md','stage_manager','director','choreographer','producer','accompanist','actor','company_admin') NOT NULL,
	`starts_on` date,
	`ended_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`open_scope` binary(16) GENERATED ALWAYS AS ((if(`ended_at` is null, ifnull(`production_id`, `company_id`), null))) VIRTUAL,
	CONSTRAINT `positions_id` PRIMARY KEY(`id`),
	CONSTRAINT `positions_open` UNIQUE(`person_id`,`kind`,`open_scope`)
);
--> statement-breakpoint
CREATE TABLE `pianist_sessions` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`bookee_id` binary(16) NOT NULL,
	`audition_room_id` binary(16),
	`call_id` binary(16),
	`starts_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	`state` enum('assigned','confirmed') NOT NULL DEFAULT 'assigned',
	CONSTRAINT `pianist_sessions_id` PRIMARY KEY(`id`),
	CONSTRAINT `pianist_sessions_call` UNIQUE(`call_id`),
	CONSTRAINT `pianist_sessions_one` CHECK((`pianist_sessions`.`audition_room_id` is null) <> (`pianist_sessions`.`call_id` is null))
);
--> statement-breakpoint
CREATE TABLE `room_bookings` (
	`id` binary(16) NOT NULL,
	`room_id` binary(16) NOT NULL,
	`starts_at` datetime(3) NOT NULL,
	`ends_at` datetime(3) NOT NULL,
	`audition_room_id` binary(16),
	`call_id` binary(16),
	CONSTRAINT `room_bookings_id` PRIMARY KEY(`id`),
	CONSTRAINT `room_bookings_audition` UNIQUE(`audition_room_id`),
	CONSTRAINT `room_bookings_call` UNIQUE(`call_id`),
	CONSTRAINT `room_bookings_one` CHECK((`room_bookings`.`audition_room_id` is null) <> (`room_bookings`.`call_id` is null))
);
--> statement-breakpoint
CREATE TABLE `rooms` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16) NOT NULL,
	`venue_id` binary(16) NOT NULL,
	`name` varchar(120) NOT NULL,
	`has_piano` boolean NOT NULL DEFAULT true,
	CONSTRAINT `rooms_id` PRIMARY KEY(`id`),
	CONSTRAINT `rooms_venue_name` UNIQUE(`venue_id`,`name`)
);
--> statement-breakpoint
CREATE TABLE `travel_times` (
	`venue_a` binary(16) NOT NULL,
	`venue_b` binary(16) NOT NULL,
	`minutes` int NOT NULL,
	CONSTRAINT `travel_times_venue_a_venue_b_pk` PRIMARY KEY(`venue_a`,`venue_b`),
	CONSTRAINT `travel_order` CHECK(`travel_times`.`venue_a` < `travel_times`.`venue_b`),
	CONSTRAINT `travel_minutes` CHECK(`travel_times`.`minutes` between 0 and 1440)
);
--> statement-breakpoint
CREATE TABLE `venues` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16) NOT NULL,
	`name` varchar(160) NOT NULL,
	`address` varchar(255) NOT NULL DEFAULT '',
	CONSTRAINT `venues_id` PRIMARY KEY(`id`),
	CONSTRAINT `venues_company_name` UNIQUE(`company_id`,`name`)
);
--> statement-breakpoint
CREATE TABLE `numbers` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`score_id` binary(16),
	`label` varchar(12) NOT NULL,
	`title` varchar(200) NOT NULL,
	`place` int NOT NULL,
	`key_fifths` tinyint,
	`key_name` varchar(8),
	`metre` varchar(12),
	`tempo` smallint,
	`bars` int,
	`seconds` int,
	`version` int NOT NULL DEFAULT 1,
	`removed_at` datetime(3),
	CONSTRAINT `numbers_id` PRIMARY KEY(`id`),
	CONSTRAINT `numbers_key` CHECK(`numbers`.`key_fifths` is null or `numbers`.`key_fifths` between -7 and 7),
	CONSTRAINT `numbers_bars` CHECK(`numbers`.`bars` is null or `numbers`.`bars` > 0)
);
--> statement-breakpoint
CREATE TABLE `roles` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`name` varchar(120) NOT NULL,
	`kind` enum('principal','supporting','ensemble') NOT NULL DEFAULT 'principal',
	`place` int NOT NULL,
	`needed` int NOT NULL DEFAULT 1,
	`covers` int NOT NULL DEFAULT 0,
	`about` text,
	`version` int NOT NULL DEFAULT 1,
	`removed_at` datetime(3),
	CONSTRAINT `roles_id` PRIMARY KEY(`id`),
	CONSTRAINT `roles_needed` CHECK(`roles`.`needed` between 1 and 400)
);
--> statement-breakpoint
CREATE TABLE `score_parts` (
	`id` binary(16) NOT NULL,
	`score_id` binary(16) NOT NULL,
	`part_id` varchar(80) NOT NULL,
	`place` int NOT NULL,
	`name` varchar(160) NOT NULL,
	`vocal` boolean NOT NULL,
	`octave_shift` tinyint NOT NULL DEFAULT 0,
	`low` tinyint,
	`high` tinyint,
	`low_spelled` varchar(8),
	`high_spelled` varchar(8),
	`optional_low` tinyint,
	`optional_high` tinyint,
	`histogram` json,
	`warnings` json NOT NULL,
	CONSTRAINT `score_parts_id` PRIMARY KEY(`id`),
	CONSTRAINT `score_parts_once` UNIQUE(`score_id`,`part_id`,`place`)
);
--> statement-breakpoint
CREATE TABLE `scores` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`file_id` binary(16) NOT NULL,
	`title` varchar(200) NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `scores_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `vocal_lines` (
	`id` binary(16) NOT NULL,
	`role_id` binary(16) NOT NULL,
	`number_id` binary(16) NOT NULL,
	`score_part_id` binary(16),
	`part_key` varchar(80) NOT NULL DEFAULT 'typed',
	`bars_key` varchar(40) NOT NULL DEFAULT 'all',
	`source` enum('read','typed') NOT NULL,
	`low` tinyint NOT NULL,
	`high` tinyint NOT NULL,
	`low_spelled` varchar(8) NOT NULL,
	`high_spelled` varchar(8) NOT NULL,
	`optional_low` tinyint,
	`optional_high` tinyint,
	`histogram` json,
	`quarters` double,
	`low_bar` varchar(12),
	`high_bar` varchar(12),
	CONSTRAINT `vocal_lines_id` PRIMARY KEY(`id`),
	CONSTRAINT `vocal_lines_once` UNIQUE(`role_id`,`number_id`,`part_key`,`bars_key`),
	CONSTRAINT `vocal_lines_order` CHECK(`vocal_lines`.`low` <= `vocal_lines`.`high` and `vocal_lines`.`low` >= 0 and `vocal_lines`.`high` <= 127)
);
--> statement-breakpoint
CREATE TABLE `productions` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16) NOT NULL,
	`season_id` binary(16),
	`title` varchar(160) NOT NULL,
	`stage` enum('planning','auditions','casting','rehearsals','running','closed') NOT NULL DEFAULT 'planning',
	`opens_on` date,
	`closes_on` date,
	`retention_months` int NOT NULL DEFAULT 6,
	`cast_published_at` datetime(3),
	`version` int NOT NULL DEFAULT 1,
	`created_at` datetime(3) NOT NULL,
	`removed_at` datetime(3),
	CONSTRAINT `productions_id` PRIMARY KEY(`id`),
	CONSTRAINT `productions_retention` CHECK(`productions`.`retention_months` between 1 and 60),
	CONSTRAINT `productions_run` CHECK(`productions`.`opens_on` is null or `productions`.`closes_on` is null or `productions`.`opens_on` <= `productions`.`closes_on`)
);
--> statement-breakpoint
CREATE TABLE `seasons` (
	`id` binary(16) NOT NULL,
	`company_id` binary(16) NOT NULL,
	`title` varchar(120) NOT NULL,
	`starts_on` date NOT NULL,
	`ends_on` date NOT NULL,
	CONSTRAINT `seasons_id` PRIMARY KEY(`id`),
	CONSTRAINT `seasons_company_title` UNIQUE(`company_id`,`title`),
	CONSTRAINT `seasons_order` CHECK(`seasons`.`starts_on` <= `seasons`.`ends_on`)
);
--> statement-breakpoint
CREATE TABLE `acknowledgements` (
	`issue_id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `acknowledgements_issue_id_person_id_pk` PRIMARY KEY(`issue_id`,`person_id`)
);
--> statement-breakpoint
CREATE TABLE `call_sheet_issues` (
	`id` binary(16) NOT NULL,
	`production_id` binary(16) NOT NULL,
	`local_date` date NOT NULL,
	`number` int NOT NULL,
	`issued_at` datetime(3) NOT NULL,
	`issued_by` binary(16),
	`snapshot` json NOT NULL,
	`concerns` json NOT NULL,
	CONSTRAINT `call_sheet_issues_id` PRIMARY KEY(`id`),
	CONSTRAINT `call_sheet_issues_once` UNIQUE(`production_id`,`local_date`,`number`)
);
--> statement-breakpoint
CREATE TABLE `accounts` (
	`user_id` binary(16) NOT NULL,
	`type` varchar(255) NOT NULL,
	`provider` varchar(100) NOT NULL,
	`provider_account_id` varchar(150) NOT NULL,
	`refresh_token` text,
	`access_token` text,
	`expires_at` int,
	`token_type` varchar(255),
	`scope` varchar(255),
	`id_token` text,
	`session_state` varchar(255),
	CONSTRAINT `accounts_provider_provider_account_id_pk` PRIMARY KEY(`provider`,`provider_account_id`)
);
--> statement-breakpoint
CREATE TABLE `api_tokens` (
	`id` binary(16) NOT NULL,
	`user_id` binary(16) NOT NULL,
	`hash` varchar(64) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`label` varchar(80) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`last_used_at` datetime(3),
	`revoked_at` datetime(3),
	CONSTRAINT `api_tokens_id` PRIMARY KEY(`id`),
	CONSTRAINT `api_tokens_hash_unique` UNIQUE(`hash`)
);
--> statement-breakpoint
CREATE TABLE `password_hashes` (
	`user_id` binary(16) NOT NULL,
	`hash` varchar(255) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `password_hashes_user_id` PRIMARY KEY(`user_id`)
);
--> statement-breakpoint
CREATE TABLE `rate_counters` (
	`key` varchar(150) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`window_start` datetime(3) NOT NULL,
	`hits` int NOT NULL DEFAULT 0,
	CONSTRAINT `rate_counters_key_window_start_pk` PRIMARY KEY(`key`,`window_start`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`session_token` varchar(191) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`user_id` binary(16) NOT NULL,
	`expires` timestamp(3) NOT NULL,
	`device` varchar(120),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `sessions_session_token` PRIMARY KEY(`session_token`)
);
--> statement-breakpoint
CREATE TABLE `users` (
	`id` binary(16) NOT NULL,
	`name` varchar(200),
	`email` varchar(254) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`email_verified` timestamp(3),
	`image` varchar(255),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `users_id` PRIMARY KEY(`id`),
	CONSTRAINT `users_email_unique` UNIQUE(`email`)
);
--> statement-breakpoint
CREATE TABLE `verification_tokens` (
	`identifier` varchar(254) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`token` varchar(191) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`expires` timestamp(3) NOT NULL,
	CONSTRAINT `verification_tokens_identifier_token_pk` PRIMARY KEY(`identifier`,`token`)
);
--> statement-breakpoint
CREATE TABLE `ranges` (
	`id` binary(16) NOT NULL,
	`person_id` binary(16) NOT NULL,
	`kind` enum('claimed','heard') NOT NULL,
	`low` tinyint NOT NULL,
	`high` tinyint NOT NULL,
	`comfortable_low` tinyint,
	`comfortable_high` tinyint,
	`production_id` binary(16),
	`given_by` binary(16),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `ranges_id` PRIMARY KEY(`id`),
	CONSTRAINT `ranges_order` CHECK(`ranges`.`low` < `ranges`.`high` and `ranges`.`low` >= 0 and `ranges`.`high` <= 127),
	CONSTRAINT `ranges_comfort` CHECK((`ranges`.`comfortable_low` is null or `ranges`.`comfortable_low` >= `ranges`.`low`) and (`ranges`.`comfortable_high` is null or `ranges`.`comfortable_high` <= `ranges`.`high`))
);
--> statement-breakpoint
ALTER TABLE `audit_events` ADD CONSTRAINT `audit_events_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `audit_events` ADD CONSTRAINT `audit_events_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `files` ADD CONSTRAINT `files_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `files` ADD CONSTRAINT `files_uploaded_by_users_id_fk` FOREIGN KEY (`uploaded_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `outbox` ADD CONSTRAINT `outbox_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `attendances` ADD CONSTRAINT `attendances_day_id_audition_days_id_fk` FOREIGN KEY (`day_id`) REFERENCES `audition_days`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `attendances` ADD CONSTRAINT `attendances_sign_up_id_sign_ups_id_fk` FOREIGN KEY (`sign_up_id`) REFERENCES `sign_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `audition_days` ADD CONSTRAINT `audition_days_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `audition_rooms` ADD CONSTRAINT `audition_rooms_day_id_audition_days_id_fk` FOREIGN KEY (`day_id`) REFERENCES `audition_days`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `audition_rooms` ADD CONSTRAINT `audition_rooms_room_id_rooms_id_fk` FOREIGN KEY (`room_id`) REFERENCES `rooms`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `day_links` ADD CONSTRAINT `day_links_day_id_audition_days_id_fk` FOREIGN KEY (`day_id`) REFERENCES `audition_days`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_ups` ADD CONSTRAINT `sign_ups_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_ups` ADD CONSTRAINT `sign_ups_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `slot_assignments` ADD CONSTRAINT `slot_assignments_sign_up_id_sign_ups_id_fk` FOREIGN KEY (`sign_up_id`) REFERENCES `sign_ups`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `slot_assignments` ADD CONSTRAINT `slot_assignments_day_id_audition_days_id_fk` FOREIGN KEY (`day_id`) REFERENCES `audition_days`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `slot_assignments` ADD CONSTRAINT `slot_assignments_slot_fk` FOREIGN KEY (`slot_id`) REFERENCES `slots`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `slots` ADD CONSTRAINT `slots_audition_room_id_audition_rooms_id_fk` FOREIGN KEY (`audition_room_id`) REFERENCES `audition_rooms`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `callback_invitations` ADD CONSTRAINT `callback_invitations_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `callback_invitations` ADD CONSTRAINT `callback_invitations_round_fk` FOREIGN KEY (`round_id`) REFERENCES `callback_rounds`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `callback_marks` ADD CONSTRAINT `callback_marks_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `callback_marks` ADD CONSTRAINT `callback_marks_role_id_roles_id_fk` FOREIGN KEY (`role_id`) REFERENCES `roles`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `callback_marks` ADD CONSTRAINT `callback_marks_round_fk` FOREIGN KEY (`round_id`) REFERENCES `callback_rounds`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `callback_rounds` ADD CONSTRAINT `callback_rounds_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `callback_rounds` ADD CONSTRAINT `callback_rounds_room_id_rooms_id_fk` FOREIGN KEY (`room_id`) REFERENCES `rooms`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `blocks` ADD CONSTRAINT `blocks_call_id_calls_id_fk` FOREIGN KEY (`call_id`) REFERENCES `calls`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `blocks` ADD CONSTRAINT `blocks_number_id_numbers_id_fk` FOREIGN KEY (`number_id`) REFERENCES `numbers`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `called` ADD CONSTRAINT `called_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `called` ADD CONSTRAINT `called_block_fk` FOREIGN KEY (`block_id`) REFERENCES `blocks`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `calls` ADD CONSTRAINT `calls_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `calls` ADD CONSTRAINT `calls_room_id_rooms_id_fk` FOREIGN KEY (`room_id`) REFERENCES `rooms`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `calls` ADD CONSTRAINT `calls_leader_id_people_id_fk` FOREIGN KEY (`leader_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `calls` ADD CONSTRAINT `calls_pianist_id_people_id_fk` FOREIGN KEY (`pianist_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `conflicts` ADD CONSTRAINT `conflicts_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `choices` ADD CONSTRAINT `choices_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `choices` ADD CONSTRAINT `choices_role_id_roles_id_fk` FOREIGN KEY (`role_id`) REFERENCES `roles`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `choices` ADD CONSTRAINT `choices_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `choices` ADD CONSTRAINT `choices_chosen_by_users_id_fk` FOREIGN KEY (`chosen_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_position_id_positions_id_fk` FOREIGN KEY (`position_id`) REFERENCES `positions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_invited_by_users_id_fk` FOREIGN KEY (`invited_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `people` ADD CONSTRAINT `people_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `people` ADD CONSTRAINT `people_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `positions` ADD CONSTRAINT `positions_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `positions` ADD CONSTRAINT `positions_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `positions` ADD CONSTRAINT `positions_production_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `pianist_sessions` ADD CONSTRAINT `pianist_sessions_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `pianist_sessions` ADD CONSTRAINT `pianist_sessions_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `pianist_sessions` ADD CONSTRAINT `pianist_sessions_audition_room_id_audition_rooms_id_fk` FOREIGN KEY (`audition_room_id`) REFERENCES `audition_rooms`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `pianist_sessions` ADD CONSTRAINT `pianist_sessions_call_fk` FOREIGN KEY (`call_id`) REFERENCES `calls`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `room_bookings` ADD CONSTRAINT `room_bookings_room_id_rooms_id_fk` FOREIGN KEY (`room_id`) REFERENCES `rooms`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `room_bookings` ADD CONSTRAINT `room_bookings_audition_room_id_audition_rooms_id_fk` FOREIGN KEY (`audition_room_id`) REFERENCES `audition_rooms`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `room_bookings` ADD CONSTRAINT `room_bookings_call_id_calls_id_fk` FOREIGN KEY (`call_id`) REFERENCES `calls`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `rooms` ADD CONSTRAINT `rooms_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `rooms` ADD CONSTRAINT `rooms_venue_id_venues_id_fk` FOREIGN KEY (`venue_id`) REFERENCES `venues`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `travel_times` ADD CONSTRAINT `travel_times_venue_a_venues_id_fk` FOREIGN KEY (`venue_a`) REFERENCES `venues`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `travel_times` ADD CONSTRAINT `travel_times_venue_b_venues_id_fk` FOREIGN KEY (`venue_b`) REFERENCES `venues`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `venues` ADD CONSTRAINT `venues_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `numbers` ADD CONSTRAINT `numbers_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `numbers` ADD CONSTRAINT `numbers_score_id_scores_id_fk` FOREIGN KEY (`score_id`) REFERENCES `scores`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `roles` ADD CONSTRAINT `roles_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `score_parts` ADD CONSTRAINT `score_parts_score_id_scores_id_fk` FOREIGN KEY (`score_id`) REFERENCES `scores`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `scores` ADD CONSTRAINT `scores_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `scores` ADD CONSTRAINT `scores_file_id_files_id_fk` FOREIGN KEY (`file_id`) REFERENCES `files`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `vocal_lines` ADD CONSTRAINT `vocal_lines_role_id_roles_id_fk` FOREIGN KEY (`role_id`) REFERENCES `roles`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `vocal_lines` ADD CONSTRAINT `vocal_lines_number_id_numbers_id_fk` FOREIGN KEY (`number_id`) REFERENCES `numbers`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `vocal_lines` ADD CONSTRAINT `vocal_lines_score_part_id_score_parts_id_fk` FOREIGN KEY (`score_part_id`) REFERENCES `score_parts`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `productions` ADD CONSTRAINT `productions_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `productions` ADD CONSTRAINT `productions_season_id_seasons_id_fk` FOREIGN KEY (`season_id`) REFERENCES `seasons`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `seasons` ADD CONSTRAINT `seasons_company_id_companies_id_fk` FOREIGN KEY (`company_id`) REFERENCES `companies`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `acknowledgements` ADD CONSTRAINT `acknowledgements_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `acknowledgements` ADD CONSTRAINT `acknowledgements_issue_fk` FOREIGN KEY (`issue_id`) REFERENCES `call_sheet_issues`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `call_sheet_issues` ADD CONSTRAINT `call_sheet_issues_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `call_sheet_issues` ADD CONSTRAINT `call_sheet_issues_issued_by_users_id_fk` FOREIGN KEY (`issued_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `accounts` ADD CONSTRAINT `accounts_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `api_tokens` ADD CONSTRAINT `api_tokens_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `password_hashes` ADD CONSTRAINT `password_hashes_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sessions` ADD CONSTRAINT `sessions_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `ranges` ADD CONSTRAINT `ranges_person_id_people_id_fk` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `ranges` ADD CONSTRAINT `ranges_production_id_productions_id_fk` FOREIGN KEY (`production_id`) REFERENCES `productions`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `ranges` ADD CONSTRAINT `ranges_given_by_users_id_fk` FOREIGN KEY (`given_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `audit_events_company` ON `audit_events` (`company_id`,`at`);--> statement-breakpoint
CREATE INDEX `audit_events_production` ON `audit_events` (`production_id`,`at`);--> statement-breakpoint
CREATE INDEX `files_production` ON `files` (`production_id`);--> statement-breakpoint
CREATE INDEX `files_company` ON `files` (`company_id`);--> statement-breakpoint
CREATE INDEX `outbox_due` ON `outbox` (`sent_at`,`gave_up_at`,`next_try_at`);--> statement-breakpoint
CREATE INDEX `audition_days_production` ON `audition_days` (`production_id`,`local_date`);--> statement-breakpoint
CREATE INDEX `sign_ups_person` ON `sign_ups` (`person_id`);--> statement-breakpoint
CREATE INDEX `callback_invitations_person` ON `callback_invitations` (`person_id`);--> statement-breakpoint
CREATE INDEX `callback_rounds_production` ON `callback_rounds` (`production_id`);--> statement-breakpoint
CREATE INDEX `called_person` ON `called` (`person_id`);--> statement-breakpoint
CREATE INDEX `calls_production` ON `calls` (`production_id`,`starts_at`);--> statement-breakpoint
CREATE INDEX `conflicts_person` ON `conflicts` (`person_id`,`starts_at`);--> statement-breakpoint
CREATE INDEX `choices_production` ON `choices` (`production_id`,`state`);--> statement-breakpoint
CREATE INDEX `choices_person` ON `choices` (`person_id`);--> statement-breakpoint
CREATE INDEX `invitations_position` ON `invitations` (`position_id`);--> statement-breakpoint
CREATE INDEX `people_user` ON `people` (`user_id`);--> statement-breakpoint
CREATE INDEX `positions_production` ON `positions` (`production_id`,`kind`);--> statement-breakpoint
CREATE INDEX `pianist_sessions_person` ON `pianist_sessions` (`person_id`,`starts_at`);--> statement-breakpoint
CREATE INDEX `pianist_sessions_production` ON `pianist_sessions` (`production_id`);--> statement-breakpoint
CREATE INDEX `room_bookings_room` ON `room_bookings` (`room_id`,`starts_at`);--> statement-breakpoint
CREATE INDEX `numbers_production` ON `numbers` (`production_id`,`place`);--> statement-breakpoint
CREATE INDEX `roles_production` ON `roles` (`production_id`,`place`);--> statement-breakpoint
CREATE INDEX `scores_production` ON `scores` (`production_id`);--> statement-breakpoint
CREATE INDEX `vocal_lines_number` ON `vocal_lines` (`number_id`);--> statement-breakpoint
CREATE INDEX `productions_company` ON `productions` (`company_id`);--> statement-breakpoint
CREATE INDEX `acknowledgements_person` ON `acknowledgements` (`person_id`);--> statement-breakpoint
CREATE INDEX `api_tokens_user` ON `api_tokens` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE INDEX `ranges_person` ON `ranges` (`person_id`,`kind`,`created_at`);