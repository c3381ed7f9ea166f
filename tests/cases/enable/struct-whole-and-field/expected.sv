// expect: parcel gated
module parcel_slot (
    input  logic        clk,
    input  logic        take, mark,
    input  logic [11:0] label,
    output logic [11:0] shown,
    input  wire         test_en
);
    typedef struct packed { logic [3:0] zone; logic [7:0] street; } parcel_t;
    parcel_t parcel;
    assign shown = parcel;
    // stillclock: parcel sleeps unless it is written
    wire wake_parcel = take || mark;
    wire gclk_parcel;
    stillclock_icg u_icg_parcel (.clk(clk), .wake(wake_parcel), .test(test_en), .gclk(gclk_parcel));
    always_ff @(posedge gclk_parcel) begin
        if (take) parcel <= label;
        if (mark) parcel.zone <= 4'hf;
    end
endmodule
