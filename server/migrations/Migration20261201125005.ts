import { Migration } from '@mikro-orm/migrations';

export class Migration20261201125005 extends Migration {
  override async up(): Promise<void> {
    this.addSql(
      `create table \`audit_events\` (\`id\` text not null, \`sequence\` integer not null, \`at_ms\` integer not null, \`actor_id\` text null, \`actor_name\` text not null, \`action\` text not null, \`entity\` text not null, \`entity_id\` text not null, \`mission_id\` text null, \`summary\` text not null, \`details\` json not null, primary key (\`id\`));`,
    );
    this.addSql(
      `create unique index \`audit_events_sequence_unique\` on \`audit_events\` (\`sequence\`);`,
    );
    this.addSql(`create index \`audit_events_at_ms_index\` on \`audit_events\` (\`at_ms\`);`);
    this.addSql(
      `create index \`audit_events_entity_id_index\` on \`audit_events\` (\`entity_id\`);`,
    );

    this.addSql(
      `create table \`element_set_uploads\` (\`id\` text not null, \`file_name\` text not null, \`size_bytes\` integer not null, \`sha256\` text not null, \`bytes\` blob not null, \`format\` text not null, \`accepted\` json not null, \`refused\` json not null, \`unknown\` json not null, \`run_id\` text null, \`uploaded_ms\` integer not null, \`uploaded_by_id\` text null, \`uploaded_by_name\` text not null, primary key (\`id\`));`,
    );
    this.addSql(
      `create unique index \`element_set_uploads_sha256_unique\` on \`element_set_uploads\` (\`sha256\`);`,
    );
    this.addSql(
      `create index \`element_set_uploads_uploaded_ms_index\` on \`element_set_uploads\` (\`uploaded_ms\`);`,
    );

    this.addSql(
      `create table \`mails\` (\`id\` text not null, \`dedupe_key\` text not null, \`to_address\` text not null, \`subject\` text not null, \`body\` text not null, \`state\` text not null default 'waiting', \`attempts\` integer not null default 0, \`next_attempt_ms\` integer not null, \`created_ms\` integer not null, \`sent_ms\` integer null, \`last_error\` text null, primary key (\`id\`));`,
    );
    this.addSql(`create unique index \`mails_dedupe_key_unique\` on \`mails\` (\`dedupe_key\`);`);
    this.addSql(`create index \`mails_state_index\` on \`mails\` (\`state\`);`);
    this.addSql(`create index \`mails_created_ms_index\` on \`mails\` (\`created_ms\`);`);

    this.addSql(
      `create table \`missions\` (\`id\` text not null, \`version\` integer not null default 1, \`name\` text not null, \`code\` text not null, \`series\` integer not null, \`priority\` integer not null, \`retired\` integer not null default false, primary key (\`id\`));`,
    );
    this.addSql(`create unique index \`missions_name_unique\` on \`missions\` (\`name\`);`);
    this.addSql(`create unique index \`missions_code_unique\` on \`missions\` (\`code\`);`);

    this.addSql(
      `create table \`requests\` (\`id\` text not null, \`version\` integer not null default 1, \`mission_id\` text not null, \`satellite_id\` text not null, \`kind\` text not null, \`pass_id\` text null, \`minutes\` real null, \`uplink\` text not null, \`from_ms\` integer not null, \`to_ms\` integer not null, \`priority\` integer not null, \`reason\` text not null, \`state\` text not null default 'open', constraint \`requests_mission_id_foreign\` foreign key(\`mission_id\`) references \`missions\`(\`id\`) on delete cascade on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`requests_mission_id_index\` on \`requests\` (\`mission_id\`);`);

    this.addSql(
      `create table \`requirements\` (\`id\` text not null, \`version\` integer not null default 1, \`mission_id\` text not null, \`applies_to\` text not null, \`station_id\` text null, \`what\` text not null, \`least\` real null, \`most\` real null, \`minimum_duration_seconds\` integer not null, \`uplink\` text not null, \`least_uplink_minutes\` real null, \`minimum_elevation_deg\` real null, \`margin_floor_db\` real null, \`hours_utc\` json null, \`weekdays\` json null, \`scan_loss_limit_db\` real null, constraint \`requirements_mission_id_foreign\` foreign key(\`mission_id\`) references \`missions\`(\`id\`) on delete cascade on update cascade, primary key (\`id\`));`,
    );
    this.addSql(
      `create index \`requirements_mission_id_index\` on \`requirements\` (\`mission_id\`);`,
    );

    this.addSql(
      `create table \`runs\` (\`id\` text not null, \`kind\` text not null, \`state\` text not null default 'queued', \`progress\` real not null default 0, \`step\` text not null default '', \`plan_id\` text null, \`plan_version\` integer null, \`input\` json not null, \`result\` json null, \`proposal\` json null, \`error\` json null, \`started_by_id\` text null, \`started_by_name\` text not null, \`created_ms\` integer not null, \`finished_ms\` integer null, primary key (\`id\`));`,
    );
    this.addSql(`create index \`runs_state_index\` on \`runs\` (\`state\`);`);
    this.addSql(`create index \`runs_plan_id_index\` on \`runs\` (\`plan_id\`);`);
    this.addSql(`create index \`runs_created_ms_index\` on \`runs\` (\`created_ms\`);`);

    this.addSql(
      `create table \`satellites\` (\`id\` text not null, \`version\` integer not null default 1, \`name\` text not null, \`catalog_number\` integer null, \`mission_id\` text not null, \`downlink\` json not null, \`uplink\` json null, \`transmits_always\` integer not null default false, \`required_cover_idb\` real null, \`guard_time_seconds\` integer null, \`time_uncertainty_seconds\` integer not null default 0, \`retired\` integer not null default false, constraint \`satellites_mission_id_foreign\` foreign key(\`mission_id\`) references \`missions\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create unique index \`satellites_name_unique\` on \`satellites\` (\`name\`);`);
    this.addSql(
      `create unique index \`satellites_catalog_number_unique\` on \`satellites\` (\`catalog_number\`);`,
    );
    this.addSql(`create index \`satellites_mission_id_index\` on \`satellites\` (\`mission_id\`);`);

    this.addSql(
      `create table \`element_sets\` (\`id\` text not null, \`upload_id\` text not null, \`satellite_id\` text null, \`catalog_number\` integer not null, \`name\` text null, \`epoch_ms\` real not null, \`line1\` text not null, \`line2\` text not null, \`state\` text not null default 'unassigned', \`use_from_ms\` integer null, \`created_ms\` integer not null, \`withdrawn_reason\` text null, constraint \`element_sets_upload_id_foreign\` foreign key(\`upload_id\`) references \`element_set_uploads\`(\`id\`) on update cascade, constraint \`element_sets_satellite_id_foreign\` foreign key(\`satellite_id\`) references \`satellites\`(\`id\`) on delete set null on update cascade, primary key (\`id\`));`,
    );
    this.addSql(
      `create index \`element_sets_upload_id_index\` on \`element_sets\` (\`upload_id\`);`,
    );
    this.addSql(
      `create index \`element_sets_satellite_id_index\` on \`element_sets\` (\`satellite_id\`);`,
    );
    this.addSql(
      `create index \`element_sets_catalog_number_index\` on \`element_sets\` (\`catalog_number\`);`,
    );
    this.addSql(
      `create index \`element_sets_satellite_id_epoch_ms_index\` on \`element_sets\` (\`satellite_id\`, \`epoch_ms\`);`,
    );

    this.addSql(
      `create table \`settings\` (\`key\` text not null, \`value\` json not null, primary key (\`key\`));`,
    );

    this.addSql(
      `create table \`stations\` (\`id\` text not null, \`version\` integer not null default 1, \`name\` text not null, \`latitude_deg\` real not null, \`longitude_deg\` real not null, \`height_m\` real not null, \`time_zone\` text not null, \`horizon_mask\` json not null, \`receive_elevation_floor_deg\` real not null, \`transmit_elevation_floor_deg\` real not null, \`keep_out_sectors\` json not null, \`guard_time_seconds\` integer not null, \`freeze_time_seconds\` integer not null, \`sign_off_cut_off_minutes\` integer not null, \`ut1minus_utc_seconds\` real not null default 0, primary key (\`id\`));`,
    );
    this.addSql(`create unique index \`stations_name_unique\` on \`stations\` (\`name\`);`);

    this.addSql(
      `create table \`passes\` (\`id\` text not null, \`station_id\` text not null, \`satellite_id\` text not null, \`prediction_id\` text not null, \`aos_ms\` integer not null, \`los_ms\` integer not null, \`max_elevation_deg\` real not null, \`vanished\` integer not null default false, constraint \`passes_station_id_foreign\` foreign key(\`station_id\`) references \`stations\`(\`id\`) on update cascade, constraint \`passes_satellite_id_foreign\` foreign key(\`satellite_id\`) references \`satellites\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`passes_station_id_index\` on \`passes\` (\`station_id\`);`);
    this.addSql(`create index \`passes_satellite_id_index\` on \`passes\` (\`satellite_id\`);`);
    this.addSql(`create index \`passes_los_ms_index\` on \`passes\` (\`los_ms\`);`);
    this.addSql(
      `create index \`passes_station_id_aos_ms_index\` on \`passes\` (\`station_id\`, \`aos_ms\`);`,
    );
    this.addSql(
      `create index \`passes_satellite_id_aos_ms_index\` on \`passes\` (\`satellite_id\`, \`aos_ms\`);`,
    );

    this.addSql(
      `create table \`predictions\` (\`id\` text not null, \`pass_id\` text not null, \`element_set_id\` text not null, \`station_version\` integer not null, \`aos_ms\` real not null, \`tca_ms\` real not null, \`los_ms\` real not null, \`starts_before\` integer not null, \`ends_after\` integer not null, \`max_elevation_deg\` real not null, \`aos_azimuth_deg\` real not null, \`tca_azimuth_deg\` real not null, \`los_azimuth_deg\` real not null, \`tca_range_km\` real not null, \`track\` json not null, \`created_ms\` integer not null, constraint \`predictions_pass_id_foreign\` foreign key(\`pass_id\`) references \`passes\`(\`id\`) on update cascade, constraint \`predictions_element_set_id_foreign\` foreign key(\`element_set_id\`) references \`element_sets\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`predictions_pass_id_index\` on \`predictions\` (\`pass_id\`);`);
    this.addSql(
      `create index \`predictions_element_set_id_index\` on \`predictions\` (\`element_set_id\`);`,
    );

    this.addSql(
      `create table \`contacts\` (\`id\` text not null, \`pass_id\` text not null, \`satellite_id\` text not null, \`emergency\` integer not null default false, \`created_ms\` integer not null, constraint \`contacts_pass_id_foreign\` foreign key(\`pass_id\`) references \`passes\`(\`id\`) on update cascade, constraint \`contacts_satellite_id_foreign\` foreign key(\`satellite_id\`) references \`satellites\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`contacts_pass_id_index\` on \`contacts\` (\`pass_id\`);`);
    this.addSql(`create index \`contacts_satellite_id_index\` on \`contacts\` (\`satellite_id\`);`);

    this.addSql(
      `create table \`contact_logs\` (\`id\` text not null, \`contact_id\` text not null, \`outcome\` text not null, \`cause\` text not null, \`minutes\` real null, \`volume_mbit\` real null, \`note\` text not null, \`by_name\` text not null, \`at_ms\` integer not null, constraint \`contact_logs_contact_id_foreign\` foreign key(\`contact_id\`) references \`contacts\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(
      `create index \`contact_logs_contact_id_index\` on \`contact_logs\` (\`contact_id\`);`,
    );
    this.addSql(
      `create unique index \`contact_logs_contact_id_unique\` on \`contact_logs\` (\`contact_id\`);`,
    );

    this.addSql(
      `create table \`faces\` (\`id\` text not null, \`version\` integer not null default 1, \`station_id\` text not null, \`label\` text not null, \`boresight_azimuth_deg\` real not null, \`boresight_elevation_deg\` real not null, \`roll_deg\` real not null, \`elements_x\` integer not null, \`elements_y\` integer not null, \`pitch_xmm\` real not null, \`pitch_ymm\` real not null, \`receive_taper\` json not null, \`transmit_taper\` json not null, \`scan_loss_exponent\` real not null, \`scan_loss_table\` json null, \`normal_limit_db\` real not null, \`hard_end_db\` real not null, \`architecture\` text not null, \`receive_band_mhz\` json not null, \`transmit_band_mhz\` json null, \`transmit_beam_limit\` integer not null, \`required_isolation_db\` real not null, \`sidelobe_floor_db\` real not null, \`radio\` json not null, constraint \`faces_station_id_foreign\` foreign key(\`station_id\`) references \`stations\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`faces_station_id_index\` on \`faces\` (\`station_id\`);`);

    this.addSql(
      `create table \`channels\` (\`id\` text not null, \`version\` integer not null default 1, \`face_id\` text not null, \`label\` text not null, \`direction\` text not null, \`polarisation\` text not null, \`bandwidth_khz\` real not null, \`set_up_seconds\` integer not null, \`tear_down_seconds\` integer not null, \`in_service\` integer not null default true, constraint \`channels_face_id_foreign\` foreign key(\`face_id\`) references \`faces\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`channels_face_id_index\` on \`channels\` (\`face_id\`);`);
    this.addSql(
      `create unique index \`channels_face_id_label_unique\` on \`channels\` (\`face_id\`, \`label\`);`,
    );

    this.addSql(
      `create table \`day_plans\` (\`id\` text not null, \`station_id\` text not null, \`day\` text not null, \`revision\` integer not null, \`content_version\` integer not null default 1, \`state\` text not null, \`limit_of_day_db\` real not null, \`score\` json not null, \`needs_attention\` text null, \`has_been_reviewed\` integer not null default false, \`created_ms\` integer not null, \`updated_ms\` integer not null, \`created_by_id\` text null, \`submitted_by_id\` text null, \`submitted_by_name\` text null, \`released_ms\` integer null, \`released_names\` json null, \`missing_signatures_reason\` text null, \`operational\` json null, constraint \`day_plans_station_id_foreign\` foreign key(\`station_id\`) references \`stations\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`day_plans_station_id_index\` on \`day_plans\` (\`station_id\`);`);
    this.addSql(`create index \`day_plans_day_index\` on \`day_plans\` (\`day\`);`);
    this.addSql(`create index \`day_plans_state_index\` on \`day_plans\` (\`state\`);`);
    this.addSql(
      `create unique index \`day_plans_station_id_day_revision_unique\` on \`day_plans\` (\`station_id\`, \`day\`, \`revision\`);`,
    );

    this.addSql(
      `create table \`sign_off_rounds\` (\`id\` text not null, \`plan_id\` text not null, \`number\` integer not null, \`requirements\` json not null, \`requests\` json not null, \`submitted_by_id\` text null, \`submitted_by_name\` text not null, \`submitted_ms\` integer not null, \`closed_ms\` integer null, \`outcome\` text null, constraint \`sign_off_rounds_plan_id_foreign\` foreign key(\`plan_id\`) references \`day_plans\`(\`id\`) on delete cascade on update cascade, primary key (\`id\`));`,
    );
    this.addSql(
      `create index \`sign_off_rounds_plan_id_index\` on \`sign_off_rounds\` (\`plan_id\`);`,
    );
    this.addSql(
      `create unique index \`sign_off_rounds_plan_id_number_unique\` on \`sign_off_rounds\` (\`plan_id\`, \`number\`);`,
    );

    this.addSql(
      `create table \`planned_contacts\` (\`id\` text not null, \`plan_id\` text not null, \`contact_id\` text not null, \`prediction_id\` text not null, \`face_id\` text not null, \`receive_channel_id\` text not null, \`receive_from_ms\` integer not null, \`receive_to_ms\` integer not null, \`transmit_channel_id\` text null, \`transmit_from_ms\` integer null, \`transmit_to_ms\` integer null, \`locked\` integer not null default false, \`note\` text not null default '', constraint \`planned_contacts_plan_id_foreign\` foreign key(\`plan_id\`) references \`day_plans\`(\`id\`) on delete cascade on update cascade, constraint \`planned_contacts_contact_id_foreign\` foreign key(\`contact_id\`) references \`contacts\`(\`id\`) on update cascade, constraint \`planned_contacts_prediction_id_foreign\` foreign key(\`prediction_id\`) references \`predictions\`(\`id\`) on update cascade, constraint \`planned_contacts_face_id_foreign\` foreign key(\`face_id\`) references \`faces\`(\`id\`) on update cascade, constraint \`planned_contacts_receive_channel_id_foreign\` foreign key(\`receive_channel_id\`) references \`channels\`(\`id\`) on update cascade, constraint \`planned_contacts_transmit_channel_id_foreign\` foreign key(\`transmit_channel_id\`) references \`channels\`(\`id\`) on delete set null on update cascade, primary key (\`id\`));`,
    );
    this.addSql(
      `create index \`planned_contacts_plan_id_index\` on \`planned_contacts\` (\`plan_id\`);`,
    );
    this.addSql(
      `create index \`planned_contacts_contact_id_index\` on \`planned_contacts\` (\`contact_id\`);`,
    );
    this.addSql(
      `create index \`planned_contacts_prediction_id_index\` on \`planned_contacts\` (\`prediction_id\`);`,
    );
    this.addSql(
      `create index \`planned_contacts_face_id_index\` on \`planned_contacts\` (\`face_id\`);`,
    );
    this.addSql(
      `create index \`planned_contacts_receive_channel_id_index\` on \`planned_contacts\` (\`receive_channel_id\`);`,
    );
    this.addSql(
      `create index \`planned_contacts_receive_from_ms_index\` on \`planned_contacts\` (\`receive_from_ms\`);`,
    );
    this.addSql(
      `create index \`planned_contacts_transmit_channel_id_index\` on \`planned_contacts\` (\`transmit_channel_id\`);`,
    );
    this.addSql(
      `create unique index \`planned_contacts_plan_id_contact_id_unique\` on \`planned_contacts\` (\`plan_id\`, \`contact_id\`);`,
    );

    this.addSql(
      `create table \`closures\` (\`id\` text not null, \`version\` integer not null default 1, \`station_id\` text not null, \`scope\` text not null, \`scope_id\` text not null, \`direction\` text not null, \`from_ms\` integer not null, \`to_ms\` integer null, \`reduced_by_db\` real null, \`reason\` text not null, \`inhibit\` integer not null default false, \`created_by_name\` text not null, \`ended_ms\` integer null, \`ended_by_name\` text null, constraint \`closures_station_id_foreign\` foreign key(\`station_id\`) references \`stations\`(\`id\`) on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`closures_station_id_index\` on \`closures\` (\`station_id\`);`);

    this.addSql(
      `create table \`users\` (\`id\` text not null, \`version\` integer not null default 1, \`name\` text not null, \`email\` text not null, \`password_hash\` text not null, \`roles\` json not null, \`disabled\` integer not null default false, \`created_ms\` integer not null, primary key (\`id\`));`,
    );
    this.addSql(`create unique index \`users_email_unique\` on \`users\` (\`email\`);`);

    this.addSql(
      `create table \`sign_offs\` (\`id\` text not null, \`round_id\` text not null, \`mission_id\` text not null, \`state\` text not null default 'pending', \`by_id\` text null, \`by_name\` text null, \`at_ms\` integer null, \`comment\` text null, \`part\` json null, \`digest\` text null, constraint \`sign_offs_round_id_foreign\` foreign key(\`round_id\`) references \`sign_off_rounds\`(\`id\`) on delete cascade on update cascade, constraint \`sign_offs_mission_id_foreign\` foreign key(\`mission_id\`) references \`missions\`(\`id\`) on update cascade, constraint \`sign_offs_by_id_foreign\` foreign key(\`by_id\`) references \`users\`(\`id\`) on delete set null on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`sign_offs_round_id_index\` on \`sign_offs\` (\`round_id\`);`);
    this.addSql(`create index \`sign_offs_mission_id_index\` on \`sign_offs\` (\`mission_id\`);`);
    this.addSql(`create index \`sign_offs_by_id_index\` on \`sign_offs\` (\`by_id\`);`);
    this.addSql(
      `create unique index \`sign_offs_round_id_mission_id_unique\` on \`sign_offs\` (\`round_id\`, \`mission_id\`);`,
    );

    this.addSql(
      `create table \`sessions\` (\`id\` text not null, \`user_id\` text not null, \`created_ms\` integer not null, \`last_seen_ms\` integer not null, \`expires_ms\` integer not null, \`ended_ms\` integer null, constraint \`sessions_user_id_foreign\` foreign key(\`user_id\`) references \`users\`(\`id\`) on delete cascade on update cascade, primary key (\`id\`));`,
    );
    this.addSql(`create index \`sessions_user_id_index\` on \`sessions\` (\`user_id\`);`);

    this.addSql(
      `create table \`mission_leads\` (\`id\` text not null, \`mission_id\` text not null, \`user_id\` text not null, \`standing_consent\` integer not null default false, constraint \`mission_leads_mission_id_foreign\` foreign key(\`mission_id\`) references \`missions\`(\`id\`) on delete cascade on update cascade, constraint \`mission_leads_user_id_foreign\` foreign key(\`user_id\`) references \`users\`(\`id\`) on delete cascade on update cascade, primary key (\`id\`));`,
    );
    this.addSql(
      `create index \`mission_leads_mission_id_index\` on \`mission_leads\` (\`mission_id\`);`,
    );
    this.addSql(`create index \`mission_leads_user_id_index\` on \`mission_leads\` (\`user_id\`);`);
    this.addSql(
      `create unique index \`mission_leads_mission_id_user_id_unique\` on \`mission_leads\` (\`mission_id\`, \`user_id\`);`,
    );
  }
}
